import { and, desc, eq, isNull, sql } from "drizzle-orm";
import type { Handle, Tx } from "@/db/client";
import { customer, invitation, member } from "@/db/schema";
import type { Role } from "@/lib/auth/access";

const columns = {
  id: invitation.id,
  email: invitation.email,
  role: invitation.role,
  customerId: invitation.customerId,
  expiresAt: invitation.expiresAt,
  acceptedAt: invitation.acceptedAt,
  revokedAt: invitation.revokedAt,
  createdAt: invitation.createdAt,
};

function named(db: Handle) {
  return db
    .select({ ...columns, invitedBy: member.name, customerName: customer.name })
    .from(invitation)
    .innerJoin(member, and(eq(member.shopId, invitation.shopId), eq(member.id, invitation.invitedBy)))
    .leftJoin(customer, and(eq(customer.shopId, invitation.shopId), eq(customer.id, invitation.customerId)));
}

/** Before a shop is known: which one a mailed link belongs to. */
export async function shopOfInvitation(db: Handle, tokenHash: string): Promise<string | null> {
  const [row] = await db.execute<{ shop: string | null }>(
    sql`select shop_of_invitation(${tokenHash}) as shop`,
  );
  return row?.shop ?? null;
}

export async function openInvitations(db: Handle, shopId: string) {
  return named(db)
    .where(and(eq(invitation.shopId, shopId), isNull(invitation.acceptedAt), isNull(invitation.revokedAt)))
    .orderBy(desc(invitation.createdAt), desc(invitation.id));
}

export async function invitationById(db: Handle, shopId: string, id: string) {
  const [row] = await named(db).where(and(eq(invitation.shopId, shopId), eq(invitation.id, id)));
  return row;
}

export async function invitationByToken(db: Handle, shopId: string, tokenHash: string) {
  const [row] = await named(db).where(
    and(eq(invitation.shopId, shopId), eq(invitation.tokenHash, tokenHash)),
  );
  return row;
}

/** Holds the invitation until the transaction ends, so that two acceptances follow one another. */
export async function lockInvitation(tx: Tx, shopId: string, tokenHash: string) {
  const [row] = await tx
    .select(columns)
    .from(invitation)
    .where(and(eq(invitation.shopId, shopId), eq(invitation.tokenHash, tokenHash)))
    .for("update");
  return row;
}

/** Nothing comes back when an open invitation to this address exists already. */
export async function insertInvitation(
  db: Handle,
  shopId: string,
  fields: {
    id: string;
    email: string;
    role: Role;
    customerId: string | null;
    tokenHash: string;
    invitedBy: string;
    expiresAt: Date;
  },
): Promise<boolean> {
  const rows = await db
    .insert(invitation)
    .values({ ...fields, shopId })
    .onConflictDoNothing()
    .returning({ id: invitation.id });
  return rows.length > 0;
}

/** Changes an invitation that is neither accepted nor revoked. */
export async function updateOpenInvitation(
  db: Handle,
  shopId: string,
  id: string,
  fields: { tokenHash?: string; expiresAt?: Date; acceptedAt?: Date; revokedAt?: Date },
): Promise<boolean> {
  const rows = await db
    .update(invitation)
    .set({ ...fields, updatedAt: sql`now()` })
    .where(
      and(
        eq(invitation.shopId, shopId),
        eq(invitation.id, id),
        isNull(invitation.acceptedAt),
        isNull(invitation.revokedAt),
      ),
    )
    .returning({ id: invitation.id });
  return rows.length > 0;
}
