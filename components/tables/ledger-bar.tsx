"use client";

import { useEffect, useRef, useState } from "react";
import { Checkbox } from "../forms/checkbox";
import { Button } from "../ui/button";
import { SelectChip } from "../ui/chip";
import { Popover } from "../ui/popover";
import { Sign } from "../ui/sign";
import type { LedgerAddress } from "./ledger-address";
import type { LedgerColumn, LedgerFilter, LedgerRow } from "./ledger-types";

const pause = 250;

/** Above the rows: search, filters, the phone's sorting, and which columns there are. */
export function LedgerBar<Row extends LedgerRow>({
  searchLabel,
  filters,
  columns,
  address,
  change,
}: {
  searchLabel?: string;
  filters: readonly LedgerFilter[];
  columns: readonly LedgerColumn<Row>[];
  address: LedgerAddress;
  change: (part: Partial<LedgerAddress>) => void;
}) {
  const sortable = columns.filter((column) => column.sortable);
  const filtered = address.search !== "" || Object.keys(address.filters).length > 0;
  return (
    <div className="mb-2 flex flex-wrap items-center gap-2" data-no-print>
      {searchLabel ? (
        <SearchBox label={searchLabel} value={address.search} onChange={(search) => change({ search })} />
      ) : null}
      {filters.map((filter) => (
        <SelectChip
          key={filter.id}
          name={filter.name}
          anyLabel={filter.anyLabel}
          options={filter.options}
          value={address.filters[filter.id] ?? ""}
          onChange={(value) => change({ filters: { ...address.filters, [filter.id]: value } })}
        />
      ))}
      {sortable.length > 0 ? (
        <span className="sm:hidden">
          <SelectChip
            name="Sort"
            anyLabel="as usual"
            options={sortable.flatMap((column) => [
              { value: column.id, label: column.header },
              { value: `-${column.id}`, label: `${column.header}, last first` },
            ])}
            value={address.sort ? `${address.sort.descending ? "-" : ""}${address.sort.id}` : ""}
            onChange={(value) =>
              change({
                sort: value ? { id: value.replace(/^-/, ""), descending: value.startsWith("-") } : null,
              })
            }
          />
        </span>
      ) : null}
      {filtered ? (
        <Button kind="quiet" size="small" onClick={() => change({ search: "", filters: {} })}>
          Clear filters
        </Button>
      ) : null}
      <span className="ml-auto max-sm:hidden">
        <ColumnChoice
          columns={columns}
          chosen={address.columns}
          onChange={(chosen) => change({ columns: chosen })}
        />
      </span>
    </div>
  );
}

function SearchBox({
  label,
  value,
  onChange,
}: {
  label: string;
  value: string;
  onChange: (value: string) => void;
}) {
  const [typed, setTyped] = useState(value);
  const sent = useRef(value);

  // The address changed by other means (back, "Clear filters"): the box follows it.
  useEffect(() => {
    if (value !== sent.current) {
      sent.current = value;
      setTyped(value);
    }
  }, [value]);

  useEffect(() => {
    if (typed.trim() === sent.current) return;
    const timer = setTimeout(() => {
      sent.current = typed.trim();
      onChange(sent.current);
    }, pause);
    return () => clearTimeout(timer);
  }, [typed, onChange]);

  return (
    <span className="field-box h-9 min-h-0! max-w-72 touch:h-11 max-sm:max-w-none">
      <Sign name="find" className="text-ink-soft" />
      <input
        type="search"
        aria-label={label}
        placeholder={label}
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        autoComplete="off"
        className="w-full min-w-0 border-0 bg-transparent text-16 outline-none [&::-webkit-search-cancel-button]:hidden"
      />
      {typed ? (
        <button
          type="button"
          aria-label="Empty the search"
          className="-mr-3 flex h-full w-9 shrink-0 items-center justify-center rounded text-ink-soft touch:w-11"
          onClick={() => setTyped("")}
        >
          <Sign name="cross" size={12} />
        </button>
      ) : null}
    </span>
  );
}

function ColumnChoice<Row extends LedgerRow>({
  columns,
  chosen,
  onChange,
}: {
  columns: readonly LedgerColumn<Row>[];
  chosen: readonly string[];
  onChange: (chosen: string[]) => void;
}) {
  return (
    <Popover label="Columns" title="Columns">
      {columns.map((column) => {
        const on = chosen.includes(column.id) || column.phone === "title";
        return (
          <Checkbox
            key={column.id}
            label={column.header}
            checked={on}
            // The title carries the row's link, so it always stays.
            disabled={column.phone === "title"}
            onChange={() =>
              onChange(on ? chosen.filter((other) => other !== column.id) : [...chosen, column.id])
            }
          />
        );
      })}
    </Popover>
  );
}
