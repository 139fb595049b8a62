import { z } from "zod";
import { day } from "@/lib/instruments/schema";

export const newSiteEvent = z.object({
  id: z.uuid().optional(),
  day,
  name: z.string().trim().min(1, "Give the event a name.").max(200, "At most 200 characters."),
});

/** What the form of a site's new event holds. */
export const siteEventForm = newSiteEvent.extend({ siteId: z.uuid() });

export const siteEventRecord = z.object({
  id: z.uuid(),
  siteId: z.uuid(),
  day: z.iso.date(),
  name: z.string(),
});

export const siteEventList = z.object({ items: z.array(siteEventRecord), next: z.null() });
export const siteEventParams = z.object({ id: z.uuid(), eventId: z.uuid() });

export type NewSiteEvent = z.infer<typeof newSiteEvent>;
export type SiteEventRecord = z.infer<typeof siteEventRecord>;
