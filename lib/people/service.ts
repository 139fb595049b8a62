import "server-only";
import { withShop } from "@/db/client";
import { listMembers, memberById, updateMember } from "@/db/queries/people";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, invalid, notFound, stale } from "@/lib/errors";
import { constraintOf } from "./constraint";
import type { MemberChange, MemberRecord } from "./schema";

type Row = NonNullable<Awaited<ReturnType<typeof memberById>>>;

function record(actor: Actor, row: Row): MemberRecord {
  return {
    id: row.id,
    name: row.name,
    email: may(actor.role, "team.change") ? row.email : null,
    role: row.role,
    customerId: row.customerId,
    customerName: row.customerName,
    bookable: row.bookable,
    endedAt: row.endedAt?.toISOString() ?? null,
    since: row.createdAt.toISOString(),
    version: row.version,
  };
}

/** Everybody who signs in to this shop now, customers last. */
export async function listTeam(actor: Actor): Promise<MemberRecord[]> {
  authorise(actor, "team.read");
  const rows = await withShop(actor, (tx) => listMembers(tx, actor.shopId));
  return rows.map((row) => record(actor, row));
}

export async function changeMember(
  actor: Actor,
  { id, version, ...fields }: MemberChange,
): Promise<MemberRecord> {
  authorise(actor, "team.change");
  return write(actor, id, version, fields);
}

/** The person's next request to this shop is refused; what they recorded stays under their name. */
export async function endMembership(
  actor: Actor,
  { id, version }: { id: string; version: number },
): Promise<MemberRecord> {
  authorise(actor, "team.change");
  return write(actor, id, version, { endedAt: new Date() });
}

async function write(
  actor: Actor,
  id: string,
  version: number,
  fields: { role?: MemberChange["role"]; bookable?: boolean; endedAt?: Date },
): Promise<MemberRecord> {
  try {
    return await withShop(actor, async (tx) => {
      const before = await memberById(tx, actor.shopId, id);
      if (!before || before.endedAt) throw notFound("member");
      if (before.role === "customer" && (fields.role || fields.bookable)) {
        throw invalid({
          role: "This sign-in stands for a customer. End it and invite the person to the team instead.",
        });
      }
      const written = await updateMember(tx, actor.shopId, id, version, fields);
      const after = await memberById(tx, actor.shopId, id);
      if (!after) throw notFound("member");
      if (!written) throw stale("member", record(actor, after));
      return record(actor, after);
    });
  } catch (error) {
    // Raised at commit, so that one owner can hand over to another within a transaction.
    if (constraintOf(error) === "shop_keeps_an_owner") {
      throw new AppError(
        "last-owner",
        "The shop's last owner stays its owner. Make somebody else an owner first.",
      );
    }
    throw error;
  }
}
