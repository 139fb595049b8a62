import "server-only";
import { appDb, withShop } from "@/db/client";
import { membershipsOf } from "@/db/queries/memberships";
import { renameMember } from "@/db/queries/people";
import type { Actor } from "@/lib/auth/actor";
import { auth, rememberShop } from "@/lib/auth/auth";
import { authorise } from "@/lib/auth/authorise";
import { refusalsInWords } from "@/lib/auth/outcome";
import { notFound } from "@/lib/errors";

/** The name stands in every shop the person belongs to, so it changes in all of them. */
export async function changeName(actor: Actor, requestHeaders: Headers, name: string): Promise<void> {
  authorise(actor, "account.change");
  await refusalsInWords(() => auth().api.updateUser({ body: { name }, headers: requestHeaders }));
  for (const { shopId } of await membershipsOf(appDb(), actor.personId))
    await withShop({ shopId }, (tx) => renameMember(tx, shopId, actor.personId, name));
}

/** Every other session ends; this one goes on under a new token. */
export async function changePassword(
  actor: Actor,
  requestHeaders: Headers,
  input: { currentPassword: string; newPassword: string },
): Promise<void> {
  authorise(actor, "account.change");
  const { token } = await refusalsInWords(
    () =>
      auth().api.changePassword({
        body: { ...input, revokeOtherSessions: true },
        headers: requestHeaders,
      }),
    { password: "newPassword", currentPassword: "currentPassword" },
  );
  // The session that goes on works in the same shop as before.
  if (token) await rememberShop({ token }, actor.shopId);
}

export type SessionRecord = {
  id: string;
  device: string;
  address: string | null;
  since: string;
  lastSeen: string;
  current: boolean;
};

export async function listSessions(actor: Actor, requestHeaders: Headers): Promise<SessionRecord[]> {
  authorise(actor, "account.change");
  const sessions = await refusalsInWords(() => auth().api.listSessions({ headers: requestHeaders }));
  return sessions
    .map((session) => ({
      id: session.id,
      device: session.userAgent ?? "",
      // All zeros stand for an address that was not told.
      address: /[1-9a-f]/.test(session.ipAddress ?? "") ? (session.ipAddress ?? null) : null,
      since: session.createdAt.toISOString(),
      lastSeen: session.updatedAt.toISOString(),
      current: session.id === actor.sessionId,
    }))
    .sort((a, b) => Number(b.current) - Number(a.current) || b.lastSeen.localeCompare(a.lastSeen));
}

/** Tokens never reach the page: it names a session by its id. */
export async function endSession(actor: Actor, requestHeaders: Headers, id: string): Promise<void> {
  authorise(actor, "account.change");
  const sessions = await refusalsInWords(() => auth().api.listSessions({ headers: requestHeaders }));
  const session = sessions.find((candidate) => candidate.id === id);
  if (!session) throw notFound("session");
  await refusalsInWords(() =>
    auth().api.revokeSession({ body: { token: session.token }, headers: requestHeaders }),
  );
}

export async function endOtherSessions(actor: Actor, requestHeaders: Headers): Promise<void> {
  authorise(actor, "account.change");
  await refusalsInWords(() => auth().api.revokeOtherSessions({ headers: requestHeaders }));
}

export async function switchShop(actor: Actor, shopId: string): Promise<void> {
  authorise(actor, "account.change");
  const memberships = await membershipsOf(appDb(), actor.personId);
  if (!memberships.some((membership) => membership.shopId === shopId)) throw notFound("shop");
  await rememberShop({ sessionId: actor.sessionId }, shopId);
}
