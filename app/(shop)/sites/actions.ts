"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { siteEventForm } from "@/lib/diary/events/schema";
import { addSiteEvent, removeSiteEvent } from "@/lib/diary/events/service";
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

export const addSiteEventAction = defineAction({
  name: "sites.add-event",
  permission: "service-plans.change",
  input: siteEventForm,
  run: async (actor, { siteId, ...event }) => {
    const record = await addSiteEvent(actor, siteId, event);
    revalidatePath("/sites", "layout");
    return record;
  },
});

export const removeSiteEventAction = defineAction({
  name: "sites.remove-event",
  permission: "service-plans.change",
  input: z.object({ siteId: z.uuid(), id: z.uuid() }),
  run: async (actor, { siteId, id }) => {
    await removeSiteEvent(actor, siteId, id);
    revalidatePath("/sites", "layout");
  },
});
