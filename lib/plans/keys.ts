/** What is chosen on the plan's page; what is left out is the instrument's or the shop's habit. */
export type PlanChoices = { style?: string; temperament?: string; referenceHz?: number };

export const planKeys = {
  analysis: (sheetId: string, choices: PlanChoices) => ["sheets", sheetId, "analysis", choices] as const,
  plans: (sheetId: string) => ["sheets", sheetId, "plans"] as const,
  comparison: (instrumentId: string, sheets: readonly string[]) =>
    ["instruments", instrumentId, "compare", ...sheets] as const,
  styles: ["styles"] as const,
};
