"use client";

import { useState } from "react";
import { SharpText } from "@/components/charts/note-name";
import { SHARP } from "@/components/charts/note-spelling";
import { TextArea } from "@/components/forms/text-input";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Segmented } from "@/components/ui/segmented";
import { Sign } from "@/components/ui/sign";
import { type Pasted, type PastedRow, readPasted } from "@/lib/readings/pasted-rows";
import type { ReadingUnit } from "@/lib/readings/typed-number";

type Props = {
  open: boolean;
  text: string;
  onText: (text: string) => void;
  unit: ReadingUnit;
  range: { firstMidi: number; lastMidi: number };
  referenceHz: number;
  /** Keys that have readings already: a pasted row takes their place. */
  taken: ReadonlySet<number>;
  onClose: () => void;
  onRows: (rows: readonly PastedRow[], unit: ReadingUnit) => void;
};

/** Whole rows from a spreadsheet. What does not fit stays here, with its lines named, until it is mended. */
export function PasteDialog(props: Props) {
  const { open, text, onText, unit: viewUnit, range, referenceHz, taken, onClose, onRows } = props;
  const [unit, setUnit] = useState<ReadingUnit>(viewUnit);
  const [tried, setTried] = useState(false);
  const given = text.trim() !== "";
  const pasted = given ? readPasted(text, { unit, referenceHz, ...range }) : null;
  const sound = pasted !== null && pasted.faults.length === 0;

  return (
    <Dialog
      open={open}
      onClose={onClose}
      title="Paste rows"
      className="w-[min(640px,calc(100vw-32px))]!"
      actions={
        <>
          <Button onClick={onClose}>Close and keep the text</Button>
          <Button
            kind="primary"
            onClick={() => {
              setTried(true);
              if (sound) onRows(pasted.rows, unit);
            }}
          >
            {sound ? enterWords(pasted.rows.length) : "Enter rows"}
          </Button>
        </>
      }
    >
      <p className="mt-1 mb-3 text-ink-soft">
        One line a note: its name or MIDI number, then partials 1, 2, 3 and so on, divided by tabs, semicolons
        or blanks. A first line that numbers the partials is used; empty cells are skipped.
      </p>
      <Segmented
        label="The numbers are"
        hideLabel={false}
        options={[
          { value: "cents", label: "Cents" },
          { value: "hz", label: "Hz" },
        ]}
        value={unit}
        onChange={setUnit}
        className="mb-3"
      />
      <TextArea
        label="Rows"
        data-safe=""
        rows={8}
        value={text}
        spellCheck={false}
        wrap="off"
        onChange={(event) => onText(event.target.value)}
        placeholder={unit === "hz" ? "A2\t110.02\t220.11\t330.3" : "A2\t+2.2\t+2.4\t+3.5"}
      />
      <div aria-live="polite" className="mt-3">
        {pasted ? (
          <Findings pasted={pasted} taken={taken} />
        ) : tried ? (
          <p className="text-rust">There are no rows yet. Paste them into the box.</p>
        ) : null}
      </div>
    </Dialog>
  );
}

function enterWords(rows: number): string {
  return rows === 1 ? "Enter one note" : `Enter ${rows} notes`;
}

function Findings({ pasted, taken }: { pasted: Pasted; taken: ReadonlySet<number> }) {
  const { rows, faults, moreFaults } = pasted;
  if (faults.length > 0) {
    return (
      <ul className="grid gap-1">
        {faults.map(({ line, message }) => (
          <li key={`${line} ${message}`} className="flex items-start gap-1.5">
            <Sign name="attention" className="mt-[3px] text-rust" />
            <span>
              {line === null ? null : <b className="font-semibold">Line {line}. </b>}
              <SharpText text={message.replaceAll(/\b([A-G])#(?=\d)/g, `$1${SHARP}`)} />
            </span>
          </li>
        ))}
        {moreFaults > 0 ? <li className="pl-5 text-ink-soft">And {moreFaults} more.</li> : null}
      </ul>
    );
  }
  const replaced = rows.filter(({ midi }) => taken.has(midi)).length;
  const readings = rows.reduce((sum, { values }) => sum + values.length, 0);
  return (
    <p className="text-ink-soft">
      {rows.length === 1 ? "One note" : `${rows.length} notes`} with {readings} readings
      {replaced === 0
        ? "."
        : `; ${replaced === 1 ? "one takes" : `${replaced} take`} the place of what is there.`}
    </p>
  );
}
