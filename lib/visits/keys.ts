/** Names of what the browser keeps of visits; the list's parameters come after. */
export const visitKeys = {
  all: ["visits"] as const,
  list: (days: string) => ["visits", "list", days] as const,
};
