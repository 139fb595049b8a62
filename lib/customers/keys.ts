/** Query keys of the client's cache; the list's address parameters are the last part. */
export const customerKeys = {
  all: ["customers"] as const,
  list: (query: Record<string, string | undefined>) => ["customers", "list", query] as const,
};
