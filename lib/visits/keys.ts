import type { VisitListQuery } from "./schema";

/** Names of what the browser keeps of visits. */
export const visitKeys = {
  all: ["visits"] as const,
  list: (query: Partial<VisitListQuery>) => ["visits", "list", query] as const,
};
