export const instrumentKeys = {
  all: ["instruments"] as const,
  list: (query: Record<string, string | undefined>) => ["instruments", "list", query] as const,
};
