import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import type { Actor } from "@/lib/auth/actor";
import { archiveCustomer, changeCustomer, getCustomer } from "@/lib/customers/service";
import { type ArchiveQuery, archiveQuery } from "@/lib/doors/params";
import { AppError } from "@/lib/errors";
import { archiveInstrument, getInstrument } from "@/lib/instruments/service";
import { archiveSite, getSite } from "@/lib/sites/service";
import { openVisits } from "@/lib/visits/open/schema";
import { getVisit } from "@/lib/visits/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
} from "../support/factories";

afterAll(async () => {
  await closeFactories();
  await closeDatabases();
});

async function scene() {
  const shop = await makeShop();
  const customerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, customerId, "Rope Walk 14");
  const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
  const visit = (starts: string, state: string) =>
    makeVisit(shop.shopId, { siteId, instrumentId, memberId: shop.technician.memberId, starts, state });
  return { ...shop, customerId, siteId, instrumentId, visit };
}

type Scene = Awaited<ReturnType<typeof scene>>;
type Shown = { archivedAt: string | null };

const records: [
  string,
  (at: Scene) => string,
  (actor: Actor, id: string, asked: ArchiveQuery) => Promise<Shown>,
  (actor: Actor, id: string) => Promise<Shown>,
][] = [
  ["customer", (at) => at.customerId, archiveCustomer, getCustomer],
  ["site", (at) => at.siteId, archiveSite, getSite],
  ["instrument", (at) => at.instrumentId, archiveInstrument, getInstrument],
];

describe.each(records)("archiving a %s", (what, idOf, archive, read) => {
  it("asks while visits are not over, and says which", async () => {
    const at = await scene();
    const { visitId } = await at.visit("2030-05-14 09:00", "confirmed");
    await at.visit("2030-06-14 09:00", "offered");
    const error = await archive(at.office, idOf(at), { version: 1 }).catch((reason: unknown) => reason);
    if (!(error instanceof AppError)) throw new Error("It was archived without a question");
    expect(error).toMatchObject({ code: "needs-confirming", status: 409 });
    expect(error.message).toContain(`2 visits of this ${what}`);
    expect(openVisits.parse(error.more.current)).toMatchObject({
      count: 2,
      visits: [
        { id: visitId, state: "confirmed", siteName: "Rope Walk 14", start: "2030-05-14T09:00:00+01:00" },
        { state: "offered" },
      ],
    });
    expect((await read(at.office, idOf(at))).archivedAt).toBeNull();
  });

  it("goes on when it is confirmed, and the visits stand", async () => {
    const at = await scene();
    const { visitId } = await at.visit("2030-05-14 09:00", "confirmed");
    const asked = archiveQuery.parse({ version: "1", confirm: "true" });
    expect((await archive(at.office, idOf(at), asked)).archivedAt).not.toBeNull();
    expect(await getVisit(at.office, visitId)).toMatchObject({ state: "confirmed", version: 1 });
  });

  it("asks nothing where every visit is over", async () => {
    const at = await scene();
    for (const [month, state] of ["done", "closed", "declined", "moved", "cancelled", "missed"].entries()) {
      await at.visit(`2026-0${month + 1}-14 09:00`, state);
    }
    expect((await archive(at.office, idOf(at), { version: 1 })).archivedAt).not.toBeNull();
  });
});

it("asks nothing of a change that archives nothing, nor of a restored record", async () => {
  const at = await scene();
  await at.visit("2030-05-14 09:00", "confirmed");
  await changeCustomer(at.office, at.customerId, { version: 1, phone: "+353 1 555 0100" });
  await archiveCustomer(at.office, at.customerId, { version: 2, confirm: true });
  expect(await changeCustomer(at.office, at.customerId, { version: 3, archived: false })).toMatchObject({
    archivedAt: null,
  });
});
