import { defineRoute } from "@/lib/doors/define-route";
import {
  instrumentList,
  instrumentListQuery,
  instrumentRecord,
  newInstrument,
} from "@/lib/instruments/schema";
import { createInstrument, findInstruments } from "@/lib/instruments/service";

export const GET = defineRoute({
  method: "GET",
  permission: "instruments.read",
  summary: "List instruments",
  query: instrumentListQuery,
  response: instrumentList,
  handle: ({ actor, query }) => findInstruments(actor, query),
});

export const POST = defineRoute({
  method: "POST",
  permission: "instruments.create",
  summary: "Create an instrument at its place; the same id twice is one record",
  body: newInstrument,
  response: instrumentRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, body }) => createInstrument(actor, body),
});
