import "server-only";
import { cache } from "react";
import { appDb } from "@/db/client";
import { type Membership, membershipsOf } from "@/db/queries/memberships";
import type { Role } from "@/lib/auth/access";
import { AppError } from "@/lib/errors";
import { noteActor } from "@/lib/log";
import { auth } from "./auth";
import { presentHeaders } from "./present-headers";

/** Who is asking, in which shop and as what. Made here and nowhere else. */
export type Actor = {
  personId: string;
  sessionId: string;
  shopId: string;
  memberId: string;
  role: Role;
  /** Set for a customer's sign-in: the database then shows this customer's records only. */
  customerId: string | null;
  name: string;
  shopName: string;
};

export type SignedInPerson = {
  personId: string;
  sessionId: string;
  name: string;
  email: string;
  secondStep: boolean;
  memberships: Membership[];
  actor: Actor | null;
};

/** The signed-in person with all memberships, or null. A person may belong to several shops, or to none yet. */
export async function personFrom(requestHeaders: Headers): Promise<SignedInPerson | null> {
  const current = await auth().api.getSession({ headers: requestHeaders });
  if (!current) return null;
  const { user, session } = current;
  const memberships = await membershipsOf(appDb(), user.id);
  const chosen = memberships.find((membership) => membership.shopId === session.shopId) ?? memberships[0];
  const actor = chosen
    ? {
        personId: user.id,
        sessionId: session.id,
        shopId: chosen.shopId,
        memberId: chosen.memberId,
        role: chosen.role,
        customerId: chosen.customerId,
        name: chosen.memberName,
        shopName: chosen.shopName,
      }
    : null;
  if (actor) noteActor({ shopId: actor.shopId, personId: actor.personId });
  return {
    personId: user.id,
    sessionId: session.id,
    name: user.name,
    email: user.email,
    secondStep: Boolean(user.twoFactorEnabled),
    memberships,
    actor,
  };
}

/** For pages and layouts: asked once per request however many parts need it. */
export const currentPerson = cache(async () => personFrom(await presentHeaders()));

/** For doors: the actor, or a 401. */
export async function requireActor(requestHeaders: Headers): Promise<Actor> {
  const person = await personFrom(requestHeaders);
  if (!person?.actor)
    throw new AppError("signed-out", "You are signed out. Sign in again; what you typed is still here.");
  return person.actor;
}

/** For doors that a person without a shop may use too: the person, or a 401. */
export async function requirePerson(requestHeaders: Headers): Promise<SignedInPerson> {
  const person = await personFrom(requestHeaders);
  if (!person)
    throw new AppError("signed-out", "You are signed out. Sign in again; what you typed is still here.");
  return person;
}
