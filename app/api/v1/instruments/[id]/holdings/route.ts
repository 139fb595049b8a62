import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { findHoldings, moveInstrument } from "@/lib/instruments/holdings/service";
import { holdingList, instrumentRecord, newHolding } from "@/lib/instruments/schema";

export const GET = defineRoute({
  method: "GET",
  permission: "instruments.read",
  summary: "List the places and owners of an instrument, newest first",
  params: idParams,
  response: holdingList,
  handle: ({ actor, params }) => findHoldings(actor, params.id),
});

export const POST = defineRoute({
  method: "POST",
  permission: "instruments.place",
  summary: "Record that an instrument moved or was sold: closes its place and opens another",
  params: idParams,
  body: newHolding,
  response: instrumentRecord,
  status: 201,
  problems: ["stale"],
  handle: ({ actor, params, body }) => moveInstrument(actor, params.id, body),
});
