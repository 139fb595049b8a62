import type { LedgerColumn } from "@/components/tables/ledger-types";
import { showDayOf } from "@/lib/dates";
import type { RecordClock } from "./records-ledger";

type Row = { id: string; href: string };

/** How many instruments hang on the record; on the phone with the word, where no heading says it. */
export function instrumentCount<Counted extends Row & { instruments: number }>(): LedgerColumn<Counted> {
  return {
    id: "instruments",
    header: "Instruments",
    cell: ({ instruments }) => (
      <>
        {instruments}
        <span className="text-ink-soft sm:hidden">{instruments === 1 ? " instrument" : " instruments"}</span>
      </>
    ),
    align: "right",
    width: 88,
    phone: "aside",
  };
}

export function changedOn<Changed extends Row & { updatedAt: string }>({
  locale,
  timeZone,
}: RecordClock): LedgerColumn<Changed> {
  return {
    id: "updated",
    header: "Changed",
    cell: ({ updatedAt }) => showDayOf(updatedAt, locale, timeZone),
    sortable: true,
    extra: true,
    phone: "none",
  };
}
