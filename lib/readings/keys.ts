/** Query keys of the client's cache. */
export const readingKeys = {
  sheets: (instrumentId: string) => ["instruments", instrumentId, "sheets"] as const,
  sheet: (sheetId: string) => ["sheets", sheetId] as const,
};
