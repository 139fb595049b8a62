export const searchKeys = { find: (q: string) => ["search", q] as const };
