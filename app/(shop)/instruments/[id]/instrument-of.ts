import { cache } from "react";
import { getInstrument } from "@/lib/instruments/service";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";

/** The instrument of the address, read once for the layout, the page and its title. */
export const instrumentOf = cache(async (id: string) => {
  const actor = await staffActor();
  return orNotFound(id, (known) => getInstrument(actor, known));
});
