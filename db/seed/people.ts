import { hashPassword } from "better-auth/crypto";
import type { Handle } from "@/db/client";
import { account, member, person, shop } from "@/db/schema";
import { normalisePassword } from "@/lib/auth/passwords";
import type { Chance } from "./random";

const demoPassword = "port-averil-demo-2026";

export type SeedPerson = {
  name: string;
  email: string;
  role: "owner" | "office" | "technician" | "customer";
  bookable: boolean;
  customerId?: string;
};

export const larchAndWren: readonly SeedPerson[] = [
  { name: "Rosalind Larch", email: "owner@larchandwren.example", role: "owner", bookable: false },
  { name: "Tomas Wren", email: "office@larchandwren.example", role: "office", bookable: false },
  { name: "Ines Maroval", email: "tech@larchandwren.example", role: "technician", bookable: true },
  { name: "Edvin Stroud", email: "tech2@larchandwren.example", role: "technician", bookable: true },
  { name: "Nadia Ferris", email: "tech3@larchandwren.example", role: "technician", bookable: true },
];

export const harbourStreet: readonly SeedPerson[] = [
  { name: "Corin Blackwood", email: "owner@harbourstreet.example", role: "owner", bookable: true },
];

export type SeedShop = typeof shop.$inferInsert;

export async function writeShop(db: Handle, values: SeedShop): Promise<void> {
  await db.insert(shop).values(values);
}

/** A person with a password, and their place in the shop. Answers with the member's id. */
export async function writeMember(
  db: Handle,
  chance: Chance,
  shopId: string,
  { name, email, role, bookable, customerId }: SeedPerson,
  at: Date,
): Promise<string> {
  const personId = chance.id(at);
  const memberId = chance.id(at);
  await db
    .insert(person)
    .values({ id: personId, name, email, emailVerified: true, createdAt: at, updatedAt: at });
  await db.insert(account).values({
    id: chance.id(at),
    userId: personId,
    accountId: personId,
    providerId: "credential",
    password: await hashPassword(normalisePassword(demoPassword)),
    createdAt: at,
    updatedAt: at,
  });
  await db.insert(member).values({
    shopId,
    id: memberId,
    personId,
    role,
    name,
    email,
    bookable,
    customerId: customerId ?? null,
    createdAt: at,
    updatedAt: at,
  });
  return memberId;
}
