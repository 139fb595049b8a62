import "server-only";
import { type Actor, currentPerson } from "@/lib/auth/actor";
import { presentHeaders } from "@/lib/auth/present-headers";
import { showInstant } from "@/lib/dates";
import { AppError } from "@/lib/errors";
import { listSessions } from "@/lib/people/account/service";
import { deviceWords } from "@/lib/people/device";
import { roleWords } from "@/lib/people/role-words";
import { getShop } from "@/lib/shop/service";

/** A person's own account as a page shows it, the same for staff and for customers. */
export async function accountView(actor: Actor) {
  const person = await currentPerson();
  if (!person) throw new AppError("signed-out", "You are signed out. Sign in again.");
  const [shop, sessions] = await Promise.all([getShop(actor), listSessions(actor, await presentHeaders())]);
  return {
    name: person.name,
    email: person.email,
    secondStep: person.secondStep,
    sessions: sessions.map(({ id, current, device, address, since }) => ({
      id,
      current,
      device: deviceWords(device),
      details: `${address ? `from ${address}, ` : ""}since ${showInstant(since, shop.locale, shop.timeZone)}`,
    })),
    shops: person.memberships.map(({ shopId, shopName, role }) => ({
      shopId,
      shopName,
      role: roleWords[role],
      current: shopId === actor.shopId,
    })),
  };
}

export type AccountView = Awaited<ReturnType<typeof accountView>>;
