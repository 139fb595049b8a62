import { cache } from "react";
import { getCustomer } from "@/lib/customers/service";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";

/** The customer of the address, read once for the page and its title. */
export const customerOf = cache(async (id: string) => {
  const actor = await staffActor();
  return orNotFound(id, (known) => getCustomer(actor, known));
});
