import { cache } from "react";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";
import { getSite } from "@/lib/sites/service";

/** The site of the address, read once for the page and its title. */
export const siteOf = cache(async (id: string) => {
  const actor = await staffActor();
  return orNotFound(id, (known) => getSite(actor, known));
});
