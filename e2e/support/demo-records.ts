import type { APIRequestContext } from "@playwright/test";

/** Ids of the demo's records, as a member of that shop finds them. */
export async function demoRecords(request: APIRequestContext) {
  const answer = await request.get("/api/v1/instruments", { params: { q: "48213" } });
  const { items } = (await answer.json()) as { items: { id: string; siteId: string; ownerId: string }[] };
  const [instrument] = items;
  if (!instrument) throw new Error("The demo has no instrument 48213");
  const { id: instrumentId, siteId, ownerId } = instrument;
  return {
    instrumentId,
    siteId,
    customerId: ownerId,
    sheetId: await fullestSheet(request, instrumentId),
    visitId: await firstId(request, "/api/v1/visits", { instrumentId }),
    styleId: await firstId(request, "/api/v1/styles"),
    /** Of the customer who signs in. */
    ownInstrumentId: await firstId(request, "/api/v1/instruments", {
      ownerId: await firstId(request, "/api/v1/customers", { q: "customer@example.org" }),
    }),
  };
}

export type DemoRecords = Awaited<ReturnType<typeof demoRecords>>;

/** Other tests begin sheets of this instrument too; the demo's own have the most notes. */
async function fullestSheet(request: APIRequestContext, instrumentId: string) {
  const answer = await request.get(`/api/v1/instruments/${instrumentId}/sheets`, { params: { most: 100 } });
  const { items } = (await answer.json()) as { items: { id: string; notesRead: number }[] };
  const [fullest] = items.toSorted((one, other) => other.notesRead - one.notesRead);
  if (!fullest) throw new Error("The demo's instrument has no sheet");
  return fullest.id;
}

async function firstId(request: APIRequestContext, path: string, params: Record<string, string> = {}) {
  const answer = await request.get(path, { params });
  const { items = [], house = [] } = (await answer.json()) as {
    items?: { id: string }[];
    house?: { id: string }[];
  };
  const [first] = [...items, ...house];
  if (!first) throw new Error(`${path} lists nothing: ${answer.status()}`);
  return first.id;
}
