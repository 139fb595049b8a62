import "server-only";
import { AsyncLocalStorage } from "node:async_hooks";

const proven = new AsyncLocalStorage<string>();

/** Signs somebody up who came by a link that was mailed to this very address: no second mail has to prove it. */
export function withProvenAddress<T>(email: string, run: () => Promise<T>): Promise<T> {
  return proven.run(email.toLowerCase(), run);
}

export function isProvenAddress(email: string): boolean {
  return proven.getStore() === email.toLowerCase();
}
