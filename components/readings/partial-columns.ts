/** Which partials stand beside each other. */
const run = (first: number, last: number) =>
  Array.from({ length: last - first + 1 }, (_, index) => first + index);

export type PartialColumns = { low: readonly number[]; high: readonly number[] };

const ten: PartialColumns = { low: run(1, 10), high: run(11, 16) };
/** On a tablet eight leave room for B and the quality in the row, at a size to be read from the bench. */
const eight: PartialColumns = { low: run(1, 8), high: run(9, 16) };

/** Width of the table from which B and the quality stand in the row, and from which ten partials do beside them. */
export const ROW_HOLDS_FIT = 720;
export const ROW_HOLDS_TEN = 840;

/** By the table's width in pixels. */
export function columnsAt(width: number): PartialColumns {
  return width >= ROW_HOLDS_FIT && width < ROW_HOLDS_TEN ? eight : ten;
}

export const phoneColumns = ten;

export function columnsName(columns: readonly number[]): string {
  return `Partials ${columns[0]}–${columns.at(-1)}`;
}
