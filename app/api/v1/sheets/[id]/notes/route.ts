import { z } from "zod";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { noteRecord, notesInput } from "@/lib/readings/schema";
import { saveNotes } from "@/lib/readings/service";

export const PUT = defineRoute({
  method: "PUT",
  permission: "sheets.change",
  summary: "Save whole rows at once, all or none",
  params: idParams,
  body: notesInput,
  response: z.object({ items: z.array(noteRecord) }),
  problems: ["stale"],
  handle: ({ actor, params, body }) => saveNotes(actor, params.id, body),
});
