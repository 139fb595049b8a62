import { z } from "zod";
import { defineRoute } from "@/lib/doors/define-route";
import { noteInput, noteParams, noteQuery, noteRecord } from "@/lib/readings/schema";
import { getNotes, removeNote, saveNote } from "@/lib/readings/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sheets.read",
  summary: "Read one key's strings and takes with their fits",
  params: noteParams,
  response: z.object({ items: z.array(noteRecord) }),
  handle: ({ actor, params }) => getNotes(actor, params.id, params.midi),
});

export const PUT = defineRoute({
  method: "PUT",
  permission: "sheets.change",
  summary: "Save one string's partial readings; answers with the fit",
  params: noteParams,
  body: noteInput,
  response: noteRecord,
  problems: ["stale"],
  handle: ({ actor, params, body }) => saveNote(actor, params.id, params.midi, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "sheets.change",
  summary: "Take one string's readings off the sheet",
  params: noteParams,
  query: noteQuery,
  status: 204,
  problems: ["stale"],
  handle: async ({ actor, params, query }) => {
    await removeNote(actor, params.id, params.midi, query);
  },
});
