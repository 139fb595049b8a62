export const peopleKeys = {
  members: ["members"] as const,
  customerChoice: (query: string) => ["customers", "choice", query] as const,
};
