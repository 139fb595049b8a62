import type { ListPage } from "./list-query";

type Dated = { archivedAt: Date | null; updatedAt: Date };
type Written<Row extends Dated> = Omit<Row, keyof Dated> & { archivedAt: string | null; updatedAt: string };

/** A row of the database as it is handed on: its instants written out. */
export function written<Row extends Dated>(row: Row): Written<Row> {
  return {
    ...row,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    updatedAt: row.updatedAt.toISOString(),
  };
}

export function writtenPage<Row extends Dated>({ items, next }: ListPage<Row>): ListPage<Written<Row>> {
  return { items: items.map(written), next };
}
