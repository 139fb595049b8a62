"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/doors/define-action";
import { newSheet, sheetChange } from "@/lib/readings/schema";
import { changeSheet, createSheet } from "@/lib/readings/service";

/** An instrument's pages, its list and the day all show its newest sheet. */
function showChanged() {
  revalidatePath("/", "layout");
}

export const createSheetAction = defineAction({
  name: "sheets.create",
  permission: "sheets.change",
  input: newSheet.extend({ instrumentId: z.uuid() }),
  run: async (actor, { instrumentId, ...fields }) => {
    const { id } = await createSheet(actor, instrumentId, fields);
    showChanged();
    return { id };
  },
});

export const changeSheetAction = defineAction({
  name: "sheets.change",
  permission: "sheets.change",
  input: sheetChange.extend({ id: z.uuid() }),
  run: async (actor, { id, ...change }) => {
    const { version } = await changeSheet(actor, id, change);
    showChanged();
    return { version };
  },
});
