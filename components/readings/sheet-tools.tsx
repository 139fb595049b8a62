"use client";

import { NoteName } from "@/components/charts/note-name";
import { Button, LinkButton } from "@/components/ui/button";
import { Segmented } from "@/components/ui/segmented";
import { columnsAt, columnsName, phoneColumns } from "./partial-columns";
import { partialsOf, rowKey } from "./sheet-row";
import type { OpenSheet } from "./use-open-sheet";

export function UnitChoice({ sheet }: { sheet: OpenSheet }) {
  const { state, dispatch } = sheet.reading;
  return (
    <Segmented
      label="Show readings in"
      className="[&>span]:h-9! touch:[&>span]:h-11!"
      options={[
        { value: "cents", label: "Cents" },
        { value: "hz", label: "Hz" },
      ]}
      value={state.unit}
      onChange={(unit) => dispatch({ type: "unit", unit })}
    />
  );
}

/** To the partials that do not stand in the columns; with the number of notes that have some there. */
export function TurnPartials({ sheet, where }: { sheet: OpenSheet; where: "table" | "phone" }) {
  const { low, high } = where === "phone" ? phoneColumns : columnsAt(sheet.width);
  const last = low.at(-1) ?? 0;
  const beyond = sheet.rows.filter((row) => partialsOf(row).some((partial) => partial > last)).length;
  const count = beyond > 0 ? ` (${beyond === 1 ? "1 note" : `${beyond} notes`})` : "";
  return (
    <button
      type="button"
      className="link rounded-sm text-12 touch:h-11 touch:text-14"
      onClick={() => sheet.turn()}
    >
      {sheet.high ? columnsName(low) : `${columnsName(high)}${count}`}
    </button>
  );
}

/** The one thing to do now: what failed is sent again, the next note is read, or the plan is looked at. */
export function NextStep({
  sheet,
  instrumentId,
  sheetId,
}: {
  sheet: OpenSheet;
  instrumentId: string;
  sheetId: string;
}) {
  const { reading, suggestion, chooseKey } = sheet;
  const troubled = reading.unsaved.filter(({ trouble }) => trouble && trouble.kind !== "stale");
  if (troubled.length > 0) {
    return (
      <Button
        kind="primary"
        onClick={() => {
          for (const row of troubled) reading.dispatch({ type: "again", key: rowKey(row.place) });
        }}
      >
        {troubled.length === 1 ? "Save 1 note again" : `Save ${troubled.length} notes again`}
      </Button>
    );
  }
  if (suggestion) {
    return (
      <Button kind="primary" onClick={() => chooseKey?.(suggestion.midi)}>
        <span>
          Read <NoteName midi={suggestion.midi} />
        </span>
      </Button>
    );
  }
  return reading.notes.length > 0 ? (
    <LinkButton kind="primary" href={`/instruments/${instrumentId}/stretch?sheet=${sheetId}`}>
      See the stretch plan
    </LinkButton>
  ) : null;
}

export function ReadOnlyWords({ why }: { why: string | null }) {
  return why === null ? null : <p className="border-l-3 border-edge! bg-cover py-2 pl-3">{why}</p>;
}
