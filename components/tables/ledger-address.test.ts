import { describe, expect, it } from "vitest";
import { nextSort, readAddress, writeAddress } from "./ledger-address";
import type { LedgerColumn, LedgerRow } from "./ledger-types";

const columns: LedgerColumn<LedgerRow>[] = [
  { id: "name", header: "Name", cell: (row) => row.id, sortable: true, phone: "title" },
  { id: "place", header: "Place", cell: (row) => row.id },
  { id: "serial", header: "Serial", cell: (row) => row.id, extra: true },
];
const shape = {
  columns,
  filters: [{ id: "kind", name: "Kind", options: [{ value: "grand", label: "Grand" }] }],
  defaultSort: { id: "name", descending: false },
};
const read = (text: string) => readAddress(new URLSearchParams(text), shape);

describe("a ledger's address", () => {
  it("reads search, sort, filters and columns", () => {
    expect(read("q=%20abc%20&sort=-name&kind=grand&columns=serial,name")).toEqual({
      search: "abc",
      sort: { id: "name", descending: true },
      filters: { kind: "grand" },
      columns: ["name", "serial"],
    });
  });

  it("falls back on what it does not know instead of sending it to the server", () => {
    expect(read("sort=place&kind=spinet&columns=nothing")).toEqual({
      search: "",
      sort: { id: "name", descending: false },
      filters: {},
      columns: ["name", "place"],
    });
  });

  it("writes only what differs from the list's own state and keeps foreign parameters", () => {
    const start = new URLSearchParams("tab=all&sort=-name&kind=grand");
    const next = writeAddress(
      start,
      { sort: { id: "name", descending: false }, filters: {}, search: " ", columns: ["place", "name"] },
      shape,
    );
    expect(next.toString()).toBe("tab=all");
  });

  it("gives back what it wrote", () => {
    const change = {
      search: "höhe 12",
      sort: { id: "name", descending: true },
      filters: { kind: "grand" },
      columns: ["name", "serial"],
    };
    expect(readAddress(writeAddress(new URLSearchParams(), change, shape), shape)).toEqual(change);
  });

  it("sorts up, then down, then as the list would by itself", () => {
    const up = nextSort(null, "place", shape.defaultSort);
    const down = nextSort(up, "place", shape.defaultSort);
    expect([up, down, nextSort(down, "place", shape.defaultSort)]).toEqual([
      { id: "place", descending: false },
      { id: "place", descending: true },
      shape.defaultSort,
    ]);
  });
});
