"use client";

import { useEffect, useMemo, useRef, useState } from "react";
import type { KeyMark } from "@/components/charts/keyboard-ribbon";
import { NoteName } from "@/components/charts/note-name";
import { flaggedKeys } from "@/components/plans/analysis-plots";
import { useAnalysis } from "@/components/plans/use-analysis";
import { RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { Button, LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import { Segmented } from "@/components/ui/segmented";
import { EmptyState } from "@/components/ui/states";
import { type PastedRow, readPasted } from "@/lib/readings/pasted-rows";
import type { SheetRecord } from "@/lib/readings/schema";
import { stageWords } from "@/lib/readings/stage-words";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { AddNote } from "./add-note";
import { Announcer } from "./announcer";
import { notBelongingWords } from "./fit-words";
import { KeptWord } from "./kept-word";
import type { OpenNoteActions } from "./open-note";
import { PasteDialog } from "./paste-dialog";
import { PhoneNote } from "./phone-note";
import { rowState } from "./row-state";
import { ChoosingRibbon, type Clock, SheetAbout, type SheetInstrument } from "./sheet-about";
import { Exports, KeyWords } from "./sheet-foot";
import { emptyRow, type Place, partialsOf, rowKey } from "./sheet-row";
import { firstEmpty, shownRows } from "./sheet-state";
import { SheetTable } from "./sheet-table";
import { placeOf } from "./sheet-typing";
import { useBandSteps } from "./use-band-steps";
import { type InHand, useCells } from "./use-cells";
import { useReadingSheet } from "./use-reading-sheet";

const LOW = Array.from({ length: 10 }, (_, index) => index + 1);
const HIGH = Array.from({ length: 6 }, (_, index) => index + 11);

type Props = {
  sheet: SheetRecord;
  instrument: SheetInstrument;
  clock: Clock;
  /** Why this person may only read the sheet; null when they may write. */
  whyReadOnly: string | null;
  /** The note to begin at, from the address. */
  beginAt: number | null;
  tabs: React.ReactNode;
  /** Edit and archive, from the server's side. */
  sheetActions: React.ReactNode;
};

/** The open sheet: what it is on the left, the readings on the right; on the phone one note a page. */
export function ReadingSheet(props: Props) {
  const { sheet: given, instrument, clock, whyReadOnly, beginAt, tabs, sheetActions } = props;
  const canChange = whyReadOnly === null;
  const range = useMemo(
    () => ({
      firstMidi: instrument.firstMidi,
      lastMidi: instrument.lastMidi,
      breakMidi: instrument.breakMidi,
    }),
    [instrument.firstMidi, instrument.lastMidi, instrument.breakMidi],
  );
  const reading = useReadingSheet(given, range);
  const { state, dispatch, liveOf, unsaved, notes, savedAt } = reading;
  const { data: analysis } = useAnalysis(given.id, {});
  const steps = useBandSteps(notes, range, analysis);
  const [high, setHigh] = useState(false);
  const [pasting, setPasting] = useState(false);
  const [pasteText, setPasteText] = useState("");
  const columns = high ? HIGH : LOW;
  const wanted = useRef<InHand | null>(null);

  const rows = shownRows(state);
  const readKeys = new Set(rows.filter((row) => partialsOf(row).length > 0).map((row) => row.place.midi));
  const proposed = steps?.chain.find(({ midi }) => !state.rows[rowKey({ midi, string: "all", take: 1 })]);
  const enough = notes.length > 0 && (analysis?.advice.enough ?? false);
  const suggestion =
    canChange && proposed && !enough ? { midi: proposed.midi, b: proposed.predictedB } : null;
  const suggestedKey = suggestion && rowKey({ midi: suggestion.midi, string: "all", take: 1 });
  const order = [...rows.map((row) => rowKey(row.place)), ...(suggestedKey ? [suggestedKey] : [])];

  const cellsOf = { state, dispatch, liveOf, columns, onRows: enterText };
  const table = useCells({ ...cellsOf, prefix: "t-", order, tabMovesNotes: true });
  const phone = useCells({ ...cellsOf, prefix: "p-", order });

  function enterRows(pasted: readonly PastedRow[], unit: ReadingUnit) {
    const places = pasted.map(({ midi }): Place => ({ midi, string: "all", take: 1 }));
    dispatch({
      type: "enter",
      unit,
      rows: pasted.map(({ midi, values }) => ({
        place: { midi, string: "all", take: 1 },
        values,
        whole: true,
      })),
    });
    setPasting(false);
    setPasteText("");
    const [first] = places;
    if (!first) return;
    toastWithUndo(pasted.length === 1 ? "One note entered." : `${pasted.length} notes entered.`, () =>
      dispatch({ type: "undo", key: rowKey(first) }),
    );
  }

  function enterText(text: string) {
    const pasted = readPasted(text, { unit: state.unit, referenceHz: state.referenceHz, ...range });
    if (pasted.faults.length === 0) return enterRows(pasted.rows, state.unit);
    setPasteText(text);
    setPasting(true);
  }

  function choose(place: Place) {
    dispatch({ type: "choose", place });
    const key = rowKey(place);
    wanted.current = { key, partial: firstEmpty(state.rows[key], columns) };
  }

  // Once the row stands. Only the table takes the focus: on the phone the keyboard would cover the page.
  useEffect(() => {
    if (wanted.current && table.goTo(wanted.current.key, wanted.current.partial)) wanted.current = null;
  });

  const actions = useMemo<OpenNoteActions>(
    () => ({
      judge: (key, partial, keep) => dispatch({ type: "judge", key, partial, keep }),
      confirm: (key, partial) => dispatch({ type: "confirm", key, partial }),
      again: (key) => dispatch({ type: "again", key }),
      settleConflict: (key, take) => dispatch({ type: "settle-conflict", key, take }),
      undo: (key) => dispatch({ type: "undo", key }),
      remove: (key) => {
        dispatch({ type: "remove", key });
        toastWithUndo("Note removed.", () => dispatch({ type: "undo", key }));
      },
      choose: (place) => dispatch({ type: "choose", place }),
    }),
    [dispatch],
  );

  useEffect(() => {
    if (beginAt === null || !canChange) return;
    if (beginAt >= range.firstMidi && beginAt <= range.lastMidi) {
      choose({ midi: beginAt, string: "all", take: 1 });
    } else {
      showMessage({ kind: "attention", text: "This note is not on the instrument." });
    }
  }, [beginAt]);

  useEffect(() => {
    const undo = (event: KeyboardEvent) => {
      const typing = event.target instanceof HTMLElement && event.target.closest("input, textarea, select");
      if (typing || event.key.toLowerCase() !== "z" || !(event.ctrlKey || event.metaKey) || event.shiftKey)
        return;
      event.preventDefault();
      dispatch({ type: "undo", key: null });
    };
    window.addEventListener("keydown", undo);
    return () => window.removeEventListener("keydown", undo);
  }, [dispatch]);

  const openRow = state.open ? (state.rows[state.open] ?? null) : null;
  const openLive = openRow && liveOf(openRow);
  const openState = openRow && openLive && rowState(openRow, openLive, state.referenceHz);
  const flags = new Map(
    (analysis ? flaggedKeys(analysis) : []).map((key) => [key.midi, notBelongingWords(key)]),
  );
  const marks: KeyMark[] = [
    ...[...readKeys].map((midi): KeyMark => ({ midi, kind: flags.has(midi) ? "flagged" : "measured" })),
    ...(canChange ? (steps?.chain.slice(0, 3) ?? []) : [])
      .filter(({ midi }) => !readKeys.has(midi))
      .map(({ midi }): KeyMark => ({ midi, kind: "next" })),
  ];
  const phoneKey = (state.open && order.includes(state.open) ? state.open : null) ?? order[0] ?? null;
  const phoneRow = phoneKey ? (state.rows[phoneKey] ?? emptyRow(placeOf(phoneKey))) : null;
  const phoneLive = phoneRow && liveOf(phoneRow);
  const keys = {
    breakMidi: instrument.breakMidi ?? analysis?.breakMidi ?? null,
    marks,
    inHand: openRow?.place.midi ?? null,
  };
  const kept = <KeptWord rows={rows} unsaved={unsaved} savedAt={savedAt} clock={clock} />;
  const chooseKey = canChange ? (midi: number) => choose({ midi, string: "all", take: 1 }) : undefined;
  const troubled = unsaved.filter(({ trouble }) => trouble && trouble.kind !== "stale");
  const beyond = rows.filter((row) => partialsOf(row).some((partial) => partial > 10)).length;

  const turn = (
    <button
      type="button"
      className="link rounded-sm text-12 touch:h-11 touch:text-14"
      onClick={() => setHigh(!high)}
    >
      {high
        ? "Partials 1–10"
        : `Partials 11–16${beyond > 0 ? ` (${beyond === 1 ? "1 note" : `${beyond} notes`})` : ""}`}
    </button>
  );
  const units = (
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
  const paste = canChange ? <Button onClick={() => setPasting(true)}>Paste</Button> : null;
  const nextStep =
    troubled.length > 0 ? (
      <Button
        kind="primary"
        onClick={() => {
          for (const row of troubled) dispatch({ type: "again", key: rowKey(row.place) });
        }}
      >
        {troubled.length === 1 ? "Save 1 note again" : `Save ${troubled.length} notes again`}
      </Button>
    ) : suggestion ? (
      <Button kind="primary" onClick={() => chooseKey?.(suggestion.midi)}>
        <span>
          Read <NoteName midi={suggestion.midi} />
        </span>
      </Button>
    ) : notes.length > 0 ? (
      <LinkButton kind="primary" href={`/instruments/${instrument.id}/stretch?sheet=${given.id}`}>
        See the stretch plan
      </LinkButton>
    ) : null;

  return (
    <Spread
      left={
        <div className="contents max-sm:hidden">
          <SheetAbout
            sheet={reading.sheet}
            instrument={instrument}
            clock={clock}
            kept={kept}
            notesRead={readKeys.size}
            keys={keys}
            steps={steps}
            enough={enough}
            onChoose={chooseKey}
          />
        </div>
      }
      right={
        <RightPage className="max-sm:pb-40">
          <div className="max-sm:hidden">{tabs}</div>
          <Announcer row={openRow} live={openLive} state={openState} />
          <div className="max-sm:hidden print:block">
            <WorkHead
              title="Readings"
              summary={
                state.unit === "hz"
                  ? "Frequencies in Hz. Dots: distance from the fitted curve."
                  : "Cents from the nth harmonic. Dots: distance from the fitted curve."
              }
              actions={
                <>
                  {units}
                  {paste}
                  {nextStep}
                </>
              }
            />
            {whyReadOnly ? (
              <p className="mb-3 border-l-3 border-edge! bg-cover py-2 pl-3">{whyReadOnly}</p>
            ) : null}
            <div className="mb-3 hidden sm:max-lg:block" data-no-print>
              <ChoosingRibbon instrument={instrument} keys={keys} onChoose={chooseKey} height={36} labels />
            </div>
            {order.length === 0 && (!canChange || steps) ? (
              <EmptyState title="No notes read yet">
                {canChange
                  ? "Add a note below, press a key on the ribbon, or paste rows from a spreadsheet."
                  : "Nothing has been read on this sheet."}
              </EmptyState>
            ) : (
              <SheetTable
                prefix="t-"
                sheet={reading}
                cells={table}
                columns={columns}
                unit={state.unit}
                canChange={canChange}
                suggestion={suggestion}
                flags={flags}
                actions={actions}
              />
            )}
            <div className="mt-3 flex flex-wrap items-center gap-x-5 gap-y-3" data-no-print>
              {canChange ? (
                <AddNote
                  range={range}
                  onChoose={(midi) => chooseKey?.(midi)}
                  beginHere={beginAt === null && given.notes.length === 0}
                />
              ) : null}
              {canChange ? <KeyWords /> : null}
              <span className="ml-auto flex items-center gap-3">
                {turn}
                {clock.demo ? <DemoBadge /> : null}
              </span>
            </div>
            <div
              className="mt-6 flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-hairline pt-3"
              data-no-print
            >
              <Exports sheetId={given.id} />
              <span className="ml-auto flex gap-1">{sheetActions}</span>
            </div>
          </div>
          <div className="sm:hidden print:hidden">
            {phoneRow && phoneLive ? (
              <PhoneNote
                prefix="p-"
                row={phoneRow}
                live={phoneLive}
                flag={flags.get(phoneRow.place.midi) ?? null}
                state={rowState(phoneRow, phoneLive, state.referenceHz)}
                order={order}
                columns={columns}
                unit={state.unit}
                referenceHz={state.referenceHz}
                canChange={canChange}
                cells={phone}
                actions={actions}
                back={{
                  href: `/instruments/${instrument.id}/sheets`,
                  label: `${instrument.name}, ${stageWords[given.stage]}`,
                }}
                kept={kept}
                ribbon={
                  <ChoosingRibbon
                    instrument={instrument}
                    keys={keys}
                    onChoose={chooseKey}
                    height={36}
                    labels={false}
                  />
                }
                tools={
                  <>
                    {whyReadOnly ? (
                      <p className="border-l-3 border-edge! bg-cover py-2 pl-3">{whyReadOnly}</p>
                    ) : null}
                    <div className="flex flex-wrap items-center gap-3">
                      {units}
                      {paste}
                      {turn}
                    </div>
                    {canChange ? <AddNote range={range} onChoose={(midi) => chooseKey?.(midi)} /> : null}
                    <div className="flex flex-wrap items-center gap-3">
                      <Exports sheetId={given.id} />
                      {sheetActions}
                      {clock.demo ? <DemoBadge /> : null}
                    </div>
                  </>
                }
                onGo={(key) => {
                  dispatch(
                    state.rows[key]
                      ? { type: "open", key }
                      : { type: "choose", place: placeOf(key), atEnd: true },
                  );
                  window.scrollTo({ top: 0 });
                }}
              />
            ) : (
              <div className="pt-4">
                {canChange ? (
                  <AddNote range={range} onChoose={(midi) => chooseKey?.(midi)} />
                ) : (
                  "Nothing read yet."
                )}
              </div>
            )}
          </div>
          {pasting ? (
            <PasteDialog
              open
              text={pasteText}
              onText={setPasteText}
              unit={state.unit}
              range={range}
              referenceHz={state.referenceHz}
              taken={readKeys}
              onClose={() => setPasting(false)}
              onRows={enterRows}
            />
          ) : null}
        </RightPage>
      }
    />
  );
}
