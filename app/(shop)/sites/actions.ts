"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/doors/define-action";
import { newSite, siteChange } from "@/lib/sites/schema";
import { changeSite, createSite } from "@/lib/sites/service";

export const createSiteAction = defineAction({
  name: "sites.create",
  permission: "sites.change",
  input: newSite,
  run: async (actor, input) => {
    const record = await createSite(actor, input);
    revalidatePath("/sites", "layout");
    return record;
  },
});

export const changeSiteAction = defineAction({
  name: "sites.change",
  permission: "sites.change",
  input: siteChange.extend({ id: z.uuid() }),
  run: async (actor, { id, ...change }) => {
    const record = await changeSite(actor, id, change);
    revalidatePath("/sites", "layout");
    return record;
  },
});
