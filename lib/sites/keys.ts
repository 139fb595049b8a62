export const siteKeys = {
  all: ["sites"] as const,
  list: (query: Record<string, string | undefined>) => ["sites", "list", query] as const,
};
