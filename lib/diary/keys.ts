/** Names of what the browser keeps of the diary. */
export const dueKeys = {
  all: ["due"] as const,
};
