// biome-ignore-all lint/a11y/noRedundantRoles: on the phone the rows are laid out as lines, and browsers that drop the table display drop its roles with it
// biome-ignore-all lint/a11y/useSemanticElements: these are the semantic elements, with their roles written out
"use client";

import {
  FlexRender,
  type ReactTable,
  type RowSelectionState,
  type Row as TableRow,
} from "@tanstack/react-table";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { type MouseEvent, memo, type ReactNode, useId, useMemo, useRef } from "react";
import { CheckMark } from "../forms/checkbox";
import { AppLink } from "../ui/app-link";
import { cx } from "../ui/class-names";
import { Sign } from "../ui/sign";
import type { ledgerFeatures } from "./ledger-features";
import type { LedgerColumn, LedgerRow, LedgerSort } from "./ledger-types";
import { useRowKeys } from "./use-row-keys";

type Features = typeof ledgerFeatures;

const usualWidth = 104;

const from = { sm: "max-sm:hidden", lg: "max-lg:hidden", xl: "max-xl:hidden" } as const;

/** On the phone a row is two lines: title and aside, then the other cells in a run, the last one at the end. */
const phonePlace = {
  title: "phone:order-1 phone:flex-1 phone:basis-0 phone:min-w-0 phone:text-16",
  aside: "phone:order-2 phone:max-w-1/2",
  line: "phone:order-4 phone:text-ink-soft",
  end: "phone:order-5 phone:ml-auto",
  none: "phone:hidden",
} as const;

export function LedgerTable<Row extends LedgerRow>({
  table,
  label,
  columns,
  sort,
  onSort,
  selectable,
  selection,
  onChoose,
  onChooseAll,
}: {
  table: ReactTable<Features, Row, unknown>;
  label: string;
  columns: readonly LedgerColumn<Row>[];
  sort: LedgerSort | null;
  onSort: (id: string) => void;
  selectable: boolean;
  selection: RowSelectionState;
  onChoose: (id: string) => void;
  onChooseAll: (on: boolean) => void;
}) {
  const allId = useId();
  const rows = table.getRowModel().rows;
  const ids = useMemo(() => rows.map((row) => row.id), [rows]);
  const byId = useMemo(() => new Map(columns.map((column) => [column.id, column])), [columns]);
  const list = useRef<HTMLTableSectionElement>(null);
  const keys = useRowKeys({ list, ids, onChoose: selectable ? onChoose : null });
  const visible = table.getVisibleLeafColumns();
  const titleId = (columns.find((column) => column.phone === "title") ?? columns[0])?.id;
  const chosenCount = ids.filter((id) => selection[id]).length;

  return (
    <table
      role="table"
      aria-label={label}
      className="w-full table-fixed border-separate border-spacing-0 phone:block"
    >
      <thead role="rowgroup" className="phone:sr-only">
        <tr role="row">
          {selectable ? (
            <th
              role="columnheader"
              className="sticky top-0 z-10 w-9 border-b border-edge bg-sheet p-0 text-left"
            >
              <label htmlFor={allId} data-no-print className="flex h-8 items-center pl-2.5 touch:h-11">
                <CheckMark
                  id={allId}
                  className="size-4!"
                  aria-label="Choose all rows shown"
                  checked={chosenCount > 0 && chosenCount === ids.length}
                  indeterminate={chosenCount > 0 && chosenCount < ids.length}
                  onChange={(event) => onChooseAll(event.target.checked)}
                />
              </label>
            </th>
          ) : null}
          {table.getHeaderGroups()[0]?.headers.map((header) => {
            const column = byId.get(header.column.id);
            if (!column) return null;
            const sorted =
              sort?.id === column.id ? (sort.descending ? "descending" : "ascending") : undefined;
            return (
              <th
                key={header.id}
                role="columnheader"
                // In pixels, so that figures and dates stay whole on every width; the title takes what they leave.
                style={column.id === titleId ? undefined : { width: column.width ?? usualWidth }}
                aria-sort={column.sortable ? (sorted ?? "none") : undefined}
                className={cx(
                  "sticky top-0 z-10 h-8 border-b border-edge bg-sheet pr-3 pl-0 text-12 font-medium text-ink-soft first:pl-3 last:pr-2",
                  column.align === "right" ? "text-right" : "text-left",
                  column.from && from[column.from],
                )}
              >
                {column.sortable ? (
                  <button
                    type="button"
                    onClick={() => onSort(column.id)}
                    className={cx(
                      "inline-flex h-8 max-w-full items-center gap-1 rounded-sm font-medium hover:text-ink touch:h-11",
                      sorted && "font-semibold text-ink",
                    )}
                  >
                    <span className="truncate">
                      <table.FlexRender header={header} />
                    </span>
                    {sorted ? (
                      <Sign name={sorted === "ascending" ? "chevron-up" : "chevron-down"} size={10} />
                    ) : null}
                  </button>
                ) : (
                  <span className="block truncate">
                    <table.FlexRender header={header} />
                  </span>
                )}
              </th>
            );
          })}
        </tr>
      </thead>
      <tbody ref={list} role="rowgroup" className="phone:block" onKeyDown={keys.onKeyDown}>
        {rows.map((row) => (
          <LedgerLine
            key={row.id}
            row={row}
            columns={byId}
            visible={visible.map((column) => column.id).join()}
            selectable={selectable}
            chosen={Boolean(selection[row.id])}
            inHand={row.id === keys.current}
            onChoose={onChoose}
            onFocusRow={keys.onFocusRow}
          />
        ))}
      </tbody>
    </table>
  );
}

type LineProps<Row extends LedgerRow> = {
  row: TableRow<Features, Row>;
  columns: ReadonlyMap<string, LedgerColumn<Row>>;
  /** The ids of the columns in sight: a change of columns must redraw a line whose row is the same. */
  visible: string;
  selectable: boolean;
  chosen: boolean;
  inHand: boolean;
  onChoose: (id: string) => void;
  onFocusRow: (id: string) => void;
};

function Line<Row extends LedgerRow>({
  row,
  columns,
  selectable,
  chosen,
  inHand,
  onChoose,
  onFocusRow,
}: LineProps<Row>) {
  const router = useRouter();
  const checkId = useId();
  const { id, href } = row.original;
  const cells = row.getVisibleCells();
  const titleId = cells.find((cell) => columns.get(cell.column.id)?.phone === "title")?.column.id;
  const firstId = titleId ?? cells[0]?.column.id;

  function open(event: MouseEvent<HTMLElement>) {
    if (!href || event.defaultPrevented) return;
    if (event.target instanceof Element && event.target.closest("a, button, input, label, select")) return;
    // Words being marked for copying are not a wish to leave the page.
    if (window.getSelection()?.toString()) return;
    if (event.metaKey || event.ctrlKey) window.open(href, "_blank", "noopener");
    else router.push(href as Route);
  }

  return (
    <tr
      role="row"
      data-row={id}
      data-chosen={chosen || undefined}
      onClick={open}
      className={cx(
        "group/row relative phone:flex phone:min-h-16 phone:flex-wrap phone:items-center phone:gap-x-2 phone:border-b phone:border-hairline phone:py-2.5",
        "phone:after:order-3 phone:after:h-0 phone:after:basis-full phone:after:content-['']",
        selectable && "phone:pl-11",
        chosen ? "bg-brass-wash" : "has-[[data-row-focus]:focus-visible]:bg-brass-wash hover:bg-paper",
        (href ?? "") !== "" && "cursor-pointer",
        "phone:-mx-4 phone:px-4",
      )}
    >
      {selectable ? (
        <td
          role="cell"
          className={cx(
            "border-b border-hairline p-0 phone:absolute phone:inset-y-0 phone:left-0 phone:border-0",
            bar,
          )}
        >
          <label
            htmlFor={checkId}
            data-no-print
            className="flex h-[35px] items-center pl-2.5 sm:touch:h-[43px] phone:h-full phone:w-12 phone:pl-4"
          >
            <CheckMark
              id={checkId}
              className="size-4! phone:size-5!"
              data-row-check=""
              tabIndex={-1}
              checked={chosen}
              onChange={() => onChoose(id)}
              aria-label="Choose this row"
            />
          </label>
        </td>
      ) : null}
      {cells.map((cell, index) => {
        const column = columns.get(cell.column.id);
        if (!column) return null;
        const isFirst = column.id === firstId;
        const place = isFirst ? "title" : (column.phone ?? "line");
        return (
          <td
            key={cell.id}
            role={isFirst ? "rowheader" : "cell"}
            className={cx(
              "h-9 border-b border-hairline pr-3 pl-0 last:pr-2 sm:touch:h-11 phone:h-auto phone:border-0 phone:p-0!",
              column.align === "right" && "sm:text-right",
              isFirst ? "font-semibold" : "truncate",
              column.from && from[column.from],
              phonePlace[place],
              index === 0 && !selectable && cx(bar, "sm:pl-3!"),
            )}
          >
            {isFirst ? (
              <RowPlace href={href} inHand={inHand} onFocus={() => onFocusRow(id)}>
                <FlexRender cell={cell} />
              </RowPlace>
            ) : (
              <FlexRender cell={cell} />
            )}
          </td>
        );
      })}
    </tr>
  );
}

/** Memoised so that moving through a long ledger redraws two lines, not all. */
const LedgerLine = memo(Line) as typeof Line;

const bar =
  "group-data-[chosen]/row:shadow-[inset_3px_0_0_var(--brass-fill)] group-has-[[data-row-focus]:focus-visible]/row:shadow-[inset_3px_0_0_var(--brass-fill)]";

/** What the focus sits on: the row's link, or its first words where a row leads nowhere. */
function RowPlace({
  href,
  inHand,
  onFocus,
  children,
}: {
  href: string | undefined;
  inHand: boolean;
  onFocus: () => void;
  children: ReactNode;
}) {
  const shared = {
    "data-row-focus": "",
    tabIndex: inHand ? 0 : -1,
    onFocus,
    className: "-mx-1 block truncate rounded-sm px-1 -outline-offset-1",
  };
  return href ? (
    <AppLink href={href} {...shared}>
      {children}
    </AppLink>
  ) : (
    <span {...shared}>{children}</span>
  );
}
