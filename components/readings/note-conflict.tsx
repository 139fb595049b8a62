"use client";

import { Button } from "@/components/ui/button";
import { Disclosure } from "@/components/ui/disclosure";
import type { NoteRecord } from "@/lib/readings/schema";
import { type ReadingUnit, shownReading } from "@/lib/readings/typed-number";
import { cellText } from "./cell-look";
import { partialsOf, type Row } from "./sheet-row";

/** Two people changed one note: both are shown, and one is chosen. Neither is lost before that. */
export function NoteConflict({
  row,
  theirs,
  unit,
  referenceHz,
  onSettle,
}: {
  row: Row;
  theirs: NoteRecord | null;
  unit: ReadingUnit;
  referenceHz: number;
  onSettle: (take: "theirs" | "mine") => void;
}) {
  const partials = [
    ...new Set([...partialsOf(row), ...(theirs?.readings.map(({ partial }) => partial) ?? [])]),
  ].sort((one, other) => one - other);
  const their = (partial: number) => {
    const reading = theirs?.readings.find((one) => one.partial === partial);
    return reading ? shownReading(reading.hz, unit, { partial, midi: row.place.midi, referenceHz }) : "–";
  };
  return (
    <div className="flex flex-wrap items-start justify-between gap-x-4 gap-y-2">
      {theirs ? (
        <Disclosure label="See both" className="min-w-0">
          <table className="text-right">
            <thead>
              <tr className="text-12 text-ink-soft [&>th]:pr-4 [&>th]:font-medium">
                <th scope="col">Partial</th>
                <th scope="col">Mine</th>
                <th scope="col">Theirs</th>
              </tr>
            </thead>
            <tbody>
              {partials.map((partial) => {
                const mine = cellText(row, partial, { unit, referenceHz, inHand: false }) || "–";
                const other = their(partial);
                return (
                  <tr key={partial} className={mine === other ? "text-ink-soft" : "font-semibold"}>
                    <td className="pr-4 font-normal text-ink-soft">{partial}</td>
                    <td className="pr-4">{mine}</td>
                    <td className="pr-4">{other}</td>
                  </tr>
                );
              })}
            </tbody>
          </table>
        </Disclosure>
      ) : null}
      <div className="flex gap-2">
        <Button size="small" onClick={() => onSettle("theirs")}>
          {theirs ? "Take theirs" : "Leave it removed"}
        </Button>
        <Button size="small" onClick={() => onSettle("mine")}>
          Keep mine
        </Button>
      </div>
    </div>
  );
}
