import type { ActionResult } from "@/lib/doors/action-result";

/** An action after which another page follows. */
export type GoingOn = (input: unknown) => Promise<ActionResult<{ goTo: string }>>;

/** A whole new page: whoever is signed in has changed, and nothing kept from before may be shown to them. */
export function goTo(data: { goTo: string }): Promise<never> {
  window.location.assign(data.goTo);
  // The form stays busy until the next page is there.
  return new Promise(() => {});
}
