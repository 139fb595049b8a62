import Papa from "papaparse";

/**
 * RFC 4180 text of plain rows. Text cells that a spreadsheet would run as a formula are neutralised; numbers,
 * negative ones too, stay numbers. Begins with a byte-order mark, without which spreadsheets misread UTF-8.
 */
export function csv(
  rows: readonly Record<string, string | number | boolean | null>[],
  columns: readonly string[],
): string {
  return `\uFEFF${Papa.unparse(
    { fields: [...columns], data: rows.map((row) => columns.map((column) => row[column])) },
    {
      escapeFormulae: true,
      newline: "\r\n",
    },
  )}\r\n`;
}
