"use client";

import { type FocusEvent, type KeyboardEvent, useRef, useState } from "react";
import { NoteName } from "@/components/charts/note-name";
import { CheckMark } from "@/components/forms/checkbox";
import { FieldError } from "@/components/forms/field";
import { TextArea } from "@/components/forms/text-input";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/class-names";
import { Disclosure } from "@/components/ui/disclosure";
import { Sign } from "@/components/ui/sign";
import { keyName } from "@/lib/acoustics/keys";
import type { StringRecord } from "@/lib/instruments/schema";
import { type StringRow, stringColumns, stringWords } from "./string-row";
import { type StringActions, useStrings } from "./use-strings";

/** The scale by note. A row is saved when it is left; arrows and Enter go from note to note. */
export function StringsTable({
  instrument,
  saved,
  actions,
  canChange,
}: {
  instrument: { id: string; firstMidi: number; lastMidi: number };
  saved: readonly StringRecord[];
  actions: StringActions;
  canChange: boolean;
}) {
  const { rows, type, leave, settle, paste } = useStrings(instrument, saved, actions);
  const table = useRef<HTMLTableElement>(null);

  function onKey(event: KeyboardEvent<HTMLTableElement>) {
    if (!(event.target instanceof HTMLInputElement) || event.target.type === "checkbox") return;
    const step = { ArrowDown: 1, Enter: 1, ArrowUp: -1 }[event.key];
    const { midi, field } = event.target.dataset;
    if (!step || !midi || !field) return;
    event.preventDefault();
    table.current
      ?.querySelector<HTMLInputElement>(`[data-midi="${Number(midi) + step}"][data-field="${field}"]`)
      ?.focus();
  }

  function onBlur(event: FocusEvent<HTMLTableElement>) {
    const row = event.target.closest("tr");
    if (!row || row.contains(event.relatedTarget)) return;
    const left = rows.find(({ midi }) => String(midi) === row.dataset.row);
    if (left) void leave(left);
  }

  return (
    <div>
      {canChange ? <PasteBox paste={paste} /> : null}
      <div className="relative -mx-4 overflow-x-auto px-4 lg:mx-0 lg:px-0">
        <table
          ref={table}
          className="w-full min-w-130 border-t border-edge!"
          onKeyDown={onKey}
          onBlur={onBlur}
        >
          <thead>
            <tr className="lab h-8 border-b border-hairline text-right">
              <th className="pr-3 text-left font-normal">Note</th>
              <th className="pr-3 text-left font-normal">Wound</th>
              {stringColumns.map(({ field, label, unit }) => (
                <th key={field} className="pl-2 font-normal">
                  {label}
                  {unit ? `, ${unit}` : null}
                </th>
              ))}
              <th className="w-8">
                <span className="sr-only">State</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <NoteRow key={row.midi} row={row} type={type} settle={settle} canChange={canChange} />
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}

function NoteRow({
  row,
  type,
  settle,
  canChange,
}: {
  row: StringRow;
  type: (midi: number, part: Partial<StringRow>) => void;
  settle: (row: StringRow, take: "theirs" | "mine") => void;
  canChange: boolean;
}) {
  const spoken = keyName(row.midi).replace("#", " sharp ");
  const errors = Object.entries(row.errors);
  const errorId = `strings-${row.midi}-errors`;
  return (
    <>
      <tr
        data-row={row.midi}
        className={cx(
          "h-9 border-b border-hairline touch:h-11",
          row.midi % 12 === 0 && "border-t border-t-edge!",
        )}
      >
        <th className="pr-3 text-left font-semibold">
          <NoteName midi={row.midi} />
        </th>
        <td className="pr-3">
          {/* biome-ignore lint/a11y/noLabelWithoutControl: it only makes the box as large as a thumb; the box has its own words */}
          <label className="inline-flex items-center justify-center touch:size-11">
            <CheckMark
              aria-label={`${spoken}: wound`}
              checked={row.wound}
              disabled={!canChange}
              onChange={(event) => type(row.midi, { wound: event.target.checked })}
            />
          </label>
        </td>
        {stringColumns.map(({ field, label, unit }) => (
          <td key={field} className="pl-2">
            <input
              aria-label={`${spoken}: ${label}${unit ? `, ${unit}` : ""}`}
              aria-invalid={row.errors[field] ? true : undefined}
              aria-describedby={errors.length > 0 || row.newer !== undefined ? errorId : undefined}
              data-midi={row.midi}
              data-field={field}
              inputMode={field === "strings" ? "numeric" : "decimal"}
              autoComplete="off"
              readOnly={!canChange}
              value={row[field]}
              onFocus={(event) => event.target.select()}
              onChange={(event) => type(row.midi, { [field]: event.target.value })}
              className={cx(
                "h-7 w-full rounded-sm border border-transparent bg-transparent px-2 text-right text-16 -outline-offset-1 touch:h-11",
                canChange && "border-edge",
                row.errors[field] && "border-rust!",
              )}
            />
          </td>
        ))}
        <td className="w-8 text-right">
          {row.state === "saved" ? <Sign name="tick" label="saved" className="text-spruce" /> : null}
          {row.state === "saving" || row.state === "typed" ? (
            <Sign
              name="clock"
              label={row.state === "saving" ? "saving" : "not saved yet"}
              className="text-brass"
            />
          ) : null}
          {row.state === "refused" ? <Sign name="attention" label="not saved" className="text-rust" /> : null}
        </td>
      </tr>
      {errors.length > 0 ? (
        <tr className="border-b border-hairline">
          <td colSpan={7} id={errorId} className="pb-2">
            {errors.map(([path, message]) => (
              <FieldError key={path}>{message}</FieldError>
            ))}
          </td>
        </tr>
      ) : null}
      {row.newer === undefined ? null : (
        <tr className="border-b border-hairline bg-brass-wash">
          <td colSpan={7} id={errorId} className="px-2 py-2" role="alert">
            <p className="flex items-start gap-1.5">
              <Sign name="half" className="mt-[3px] text-brass" />
              <span>
                {row.newer
                  ? `Somebody saved this note meanwhile: ${stringWords(row.newer)}.`
                  : "Somebody took this note away meanwhile."}{" "}
                Yours is not saved yet.
              </span>
            </p>
            <div className="mt-2 flex flex-wrap gap-2 pl-5">
              <Button size="small" onClick={() => settle(row, "theirs")}>
                Take theirs
              </Button>
              <Button size="small" onClick={() => settle(row, "mine")}>
                Save mine over it
              </Button>
            </div>
          </td>
        </tr>
      )}
    </>
  );
}

function PasteBox({ paste }: { paste: (text: string) => Promise<string[]> }) {
  const [text, setText] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const [busy, setBusy] = useState(false);

  async function send() {
    setBusy(true);
    const found = await paste(text);
    setProblems(found);
    if (found.length === 0) setText("");
    setBusy(false);
  }

  return (
    <Disclosure label="Paste from a spreadsheet" className="mb-2">
      <div className="grid max-w-160 gap-3">
        <TextArea
          label="Rows"
          help="Columns: note, strings, wound or plain, speaking length, wire or core, outer diameter; all lengths in mm."
          placeholder={"A0\t1\twound\t1330\t1.2\t4.6"}
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
        {problems.length > 0 ? (
          <div role="alert">
            {problems.slice(0, 12).map((problem) => (
              <FieldError key={problem}>{problem}</FieldError>
            ))}
            {problems.length > 12 ? <p className="lab mt-1">and {problems.length - 12} more</p> : null}
          </div>
        ) : null}
        <div>
          <Button
            busy={busy}
            disabledReason={text.trim() ? undefined : "Paste some rows first."}
            onClick={send}
          >
            Put them in
          </Button>
        </div>
      </div>
    </Disclosure>
  );
}
