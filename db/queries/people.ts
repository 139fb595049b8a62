import { and, asc, eq, isNull, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { customer, member } from "@/db/schema";
import type { Role } from "@/lib/auth/access";

const columns = {
  id: member.id,
  personId: member.personId,
  name: member.name,
  email: member.email,
  role: member.role,
  customerId: member.customerId,
  bookable: member.bookable,
  endedAt: member.endedAt,
  createdAt: member.createdAt,
  version: member.version,
};

export async function listMembers(db: Handle, shopId: string) {
  return db
    .select({ ...columns, customerName: customer.name })
    .from(member)
    .leftJoin(customer, and(eq(customer.shopId, member.shopId), eq(customer.id, member.customerId)))
    .where(and(eq(member.shopId, shopId), isNull(member.endedAt)))
    .orderBy(asc(member.role), asc(sql`lower(${member.name})`), asc(member.id));
}

export async function memberById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select({ ...columns, customerName: customer.name })
    .from(member)
    .leftJoin(customer, and(eq(customer.shopId, member.shopId), eq(customer.id, member.customerId)))
    .where(and(eq(member.shopId, shopId), eq(member.id, id)));
  return row;
}

export async function insertMember(
  db: Handle,
  shopId: string,
  fields: {
    id: string;
    personId: string;
    name: string;
    email: string;
    role: Role;
    customerId: string | null;
    bookable: boolean;
  },
) {
  await db.insert(member).values({ ...fields, shopId });
}

/** Nothing comes back when the version is stale, the membership has ended or there is none. */
export async function updateMember(
  db: Handle,
  shopId: string,
  id: string,
  version: number,
  fields: { role?: Role; bookable?: boolean; endedAt?: Date | null },
): Promise<boolean> {
  const rows = await db
    .update(member)
    .set({ ...fields, version: version + 1, updatedAt: sql`now()` })
    .where(and(eq(member.shopId, shopId), eq(member.id, id), eq(member.version, version)))
    .returning({ id: member.id });
  return rows.length > 0;
}

/** A person's name as it stands in one shop. */
export async function renameMember(db: Handle, shopId: string, personId: string, name: string) {
  await db
    .update(member)
    .set({ name, version: sql`${member.version} + 1`, updatedAt: sql`now()` })
    .where(and(eq(member.shopId, shopId), eq(member.personId, personId), isNull(member.endedAt)));
}

export async function isMember(db: Handle, shopId: string, personId: string): Promise<boolean> {
  const rows = await db
    .select({ id: member.id })
    .from(member)
    .where(and(eq(member.shopId, shopId), eq(member.personId, personId), isNull(member.endedAt)));
  return rows.length > 0;
}

export async function isMemberAddress(db: Handle, shopId: string, email: string): Promise<boolean> {
  const rows = await db
    .select({ id: member.id })
    .from(member)
    .where(and(eq(member.shopId, shopId), eq(sql`lower(${member.email})`, email), isNull(member.endedAt)));
  return rows.length > 0;
}
