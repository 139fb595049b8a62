"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/doors/define-action";
import { newStyle, styleChange } from "@/lib/plans/schema";
import { changeStyle, createStyle } from "@/lib/plans/styles/service";

export const createStyleAction = defineAction({
  name: "styles.create",
  permission: "styles.change",
  input: newStyle,
  run: async (actor, input) => {
    const style = await createStyle(actor, input);
    revalidatePath("/shop/styles");
    return style;
  },
});

export const changeStyleAction = defineAction({
  name: "styles.change",
  permission: "styles.change",
  input: styleChange.extend({ id: z.uuid() }),
  run: async (actor, { id, ...change }) => {
    const style = await changeStyle(actor, id, change);
    revalidatePath("/shop/styles");
    return style;
  },
});
