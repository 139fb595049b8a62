import "server-only";
import { appDb, type Tx, withShop } from "@/db/client";
import { customerById } from "@/db/queries/customers";
import {
  insertInvitation,
  invitationById,
  invitationByToken,
  lockInvitation,
  openInvitations,
  shopOfInvitation,
  updateOpenInvitation,
} from "@/db/queries/invitations";
import { insertMember, isMember, isMemberAddress } from "@/db/queries/people";
import { shopById } from "@/db/queries/shop";
import type { Role } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { addressIsKnown } from "@/lib/auth/auth";
import { authorise } from "@/lib/auth/authorise";
import { env } from "@/lib/env";
import { AppError, invalid, notFound } from "@/lib/errors";
import { hashToken, newId, newToken } from "@/lib/ids";
import { requireMail, sendMail } from "@/lib/mail/send";
import { invitationMail } from "@/lib/mail/templates/invitation";
import { constraintOf } from "@/lib/people/constraint";
import type { InvitationInput, InvitationRecord } from "@/lib/people/schema";
import { signUpInvited } from "@/lib/people/sign-up/service";

const daysOpen = 7;

type Row = NonNullable<Awaited<ReturnType<typeof invitationById>>>;

function record(row: Row): InvitationRecord {
  return {
    id: row.id,
    email: row.email,
    role: row.role,
    customerName: row.customerName,
    invitedBy: row.invitedBy,
    sentAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    expired: row.expiresAt <= new Date(),
  };
}

function expiry(): Date {
  return new Date(Date.now() + daysOpen * 24 * 60 * 60 * 1000);
}

async function mail(actor: Actor, to: string, role: Role, token: string): Promise<void> {
  await sendMail(
    invitationMail({
      to,
      shopName: actor.shopName,
      invitedBy: actor.name,
      role,
      link: `${env().APP_URL}/invitation/${token}`,
      days: daysOpen,
    }),
  );
}

export async function listInvitations(actor: Actor): Promise<InvitationRecord[]> {
  authorise(actor, "team.change");
  const rows = await withShop(actor, (tx) => openInvitations(tx, actor.shopId));
  return rows.map(record);
}

/** The mail goes out inside the transaction: one that cannot be sent leaves no invitation behind. */
export async function invite(actor: Actor, input: InvitationInput): Promise<InvitationRecord> {
  authorise(actor, "team.change");
  requireMail();
  const customerId = input.role === "customer" ? (input.customerId ?? null) : null;
  const id = newId();
  const { token, hash } = newToken();
  return withShop(actor, async (tx) => {
    if (customerId && !(await customerById(tx, actor.shopId, customerId)))
      throw invalid({ customerId: "Choose a customer of this shop." });
    if (await isMemberAddress(tx, actor.shopId, input.email))
      throw invalid({ email: "Somebody with this address signs in to this shop already." });
    const made = await insertInvitation(tx, actor.shopId, {
      id,
      email: input.email,
      role: input.role,
      customerId,
      tokenHash: hash,
      invitedBy: actor.memberId,
      expiresAt: expiry(),
    });
    if (!made)
      throw invalid({ email: "This address is invited already. Send that invitation again, or revoke it." });
    const row = await invitationById(tx, actor.shopId, id);
    if (!row) throw notFound("invitation");
    await mail(actor, input.email, input.role, token);
    return record(row);
  });
}

/** A new link; the one mailed before stops working. */
export async function resendInvitation(actor: Actor, id: string): Promise<InvitationRecord> {
  authorise(actor, "team.change");
  requireMail();
  const { token, hash } = newToken();
  return withShop(actor, async (tx) => {
    const changed = await updateOpenInvitation(tx, actor.shopId, id, {
      tokenHash: hash,
      expiresAt: expiry(),
    });
    const row = await invitationById(tx, actor.shopId, id);
    if (!changed || !row) throw notFound("invitation");
    await mail(actor, row.email, row.role, token);
    return record(row);
  });
}

export async function revokeInvitation(actor: Actor, id: string): Promise<void> {
  authorise(actor, "team.change");
  const changed = await withShop(actor, (tx) =>
    updateOpenInvitation(tx, actor.shopId, id, { revokedAt: new Date() }),
  );
  if (!changed) throw notFound("invitation");
}

export type InvitationState = "open" | "used" | "revoked" | "expired";

function stateOf(row: { acceptedAt: Date | null; revokedAt: Date | null; expiresAt: Date }): InvitationState {
  if (row.acceptedAt) return "used";
  if (row.revokedAt) return "revoked";
  return row.expiresAt <= new Date() ? "expired" : "open";
}

const closed: Record<Exclude<InvitationState, "open">, string> = {
  used: "This invitation has been used. Sign in with your address.",
  revoked: "This invitation was taken back. Ask the shop for a new one.",
  expired: "This invitation has expired. Ask the shop for a new one.",
};

/** What the mailed link shows to whoever holds it, or null for a link that never was. Opening changes nothing. */
export async function invitationBehind(token: string) {
  const hash = hashToken(token);
  const shopId = await shopOfInvitation(appDb(), hash);
  if (!shopId) return null;
  return withShop({ shopId }, async (tx) => {
    const row = await invitationByToken(tx, shopId, hash);
    const shop = await shopById(tx, shopId);
    if (!row || !shop) return null;
    const state = stateOf(row);
    return {
      shopName: shop.name,
      email: row.email,
      role: row.role,
      invitedBy: row.invitedBy,
      state,
      words: state === "open" ? null : closed[state],
      addressKnown: await addressIsKnown(row.email),
    };
  });
}

type Accepting = { personId: string; name: string; email: string };

/** One invitation, one membership, for the invited address only; of two at once, the second is told it is used. */
export async function acceptInvitation(person: Accepting, token: string): Promise<{ shopId: string }> {
  const hash = hashToken(token);
  const shopId = await shopOfInvitation(appDb(), hash);
  if (!shopId) throw notFound("invitation");
  try {
    await withShop({ shopId }, (tx) => accept(tx, shopId, hash, person));
  } catch (error) {
    if (constraintOf(error) === "member_person") throw alreadyMember();
    throw error;
  }
  return { shopId };
}

async function accept(tx: Tx, shopId: string, hash: string, person: Accepting): Promise<void> {
  const row = await lockInvitation(tx, shopId, hash);
  if (!row) throw notFound("invitation");
  const state = stateOf(row);
  if (state !== "open") throw new AppError("conflict", closed[state]);
  if (row.email.toLowerCase() !== person.email.toLowerCase()) {
    throw new AppError(
      "forbidden",
      `This invitation was sent to ${row.email}. Sign out, and sign in with that address.`,
    );
  }
  if (await isMember(tx, shopId, person.personId)) throw alreadyMember();
  await insertMember(tx, shopId, {
    id: newId(),
    personId: person.personId,
    name: person.name,
    email: person.email,
    role: row.role,
    customerId: row.customerId,
    bookable: row.role === "technician",
  });
  await updateOpenInvitation(tx, shopId, row.id, { acceptedAt: new Date() });
}

/**
 * The link proves the address, so the new person's address is the invitation's and not one that is typed.
 * Should the invitation be used up meanwhile, the person stays and can sign in.
 */
export async function acceptAsNewPerson(
  requestHeaders: Headers,
  input: { token: string; name: string; password: string },
): Promise<{ shopId: string }> {
  const behind = await invitationBehind(input.token);
  if (!behind) throw notFound("invitation");
  if (behind.words) throw new AppError("conflict", behind.words);
  if (behind.addressKnown) {
    throw new AppError(
      "conflict",
      `${behind.email} has a sign-in already. Sign in with it, then accept the invitation.`,
    );
  }
  const person = await signUpInvited(
    requestHeaders,
    { name: input.name, email: behind.email, password: input.password },
    [behind.shopName],
  );
  return acceptInvitation(person, input.token);
}

function alreadyMember(): AppError {
  return new AppError("conflict", "You belong to this shop already.");
}
