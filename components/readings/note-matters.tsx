"use client";

import { SharpText } from "@/components/charts/note-name";
import { Button, LinkButton } from "@/components/ui/button";
import { Segmented } from "@/components/ui/segmented";
import { Sign } from "@/components/ui/sign";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { questionWords, rejectionWords } from "./fit-words";
import type { Live } from "./live-fit";
import { NoteConflict } from "./note-conflict";
import type { RowState } from "./row-state";
import { cellFault, cellHz, partialsOf, type Row, type RowKey, rowKey, type Trouble } from "./sheet-row";

export type NoteMattersActions = {
  judge: (key: RowKey, partial: number, keep: boolean) => void;
  confirm: (key: RowKey, partial: number) => void;
  again: (key: RowKey) => void;
  settleConflict: (key: RowKey, take: "theirs" | "mine") => void;
};

type Props = {
  id: string;
  row: Row;
  live: Live;
  state: RowState;
  unit: ReadingUnit;
  referenceHz: number;
  canChange: boolean;
  big?: boolean;
  /** Where each partial says its own, only what concerns the whole note is said here. */
  wholeOnly?: boolean;
  actions: NoteMattersActions;
};

/** What waits for the person: a failed save, a number that is none, a question, a reading left out. */
export function NoteMatters(props: Props) {
  const { id, row, live, state, unit, referenceHz, canChange, big, wholeOnly = false, actions } = props;
  const key = rowKey(row.place);
  const partials = [...new Set([...partialsOf(row)])];
  return (
    <div id={id} className="grid gap-2">
      {row.trouble ? (
        <Matter
          what={state.sentence}
          actions={<TroubleActions trouble={row.trouble} again={() => actions.again(key)} />}
        />
      ) : state.kind === "attention" && state.word === "empty" ? (
        <Matter what={state.sentence} />
      ) : null}
      {row.trouble?.kind === "stale" ? (
        <NoteConflict
          row={row}
          theirs={row.trouble.theirs}
          unit={unit}
          referenceHz={referenceHz}
          onSettle={(take) => actions.settleConflict(key, take)}
        />
      ) : null}
      {wholeOnly
        ? null
        : partials.map((partial) => (
            <PartialMatter
              key={partial}
              row={row}
              partial={partial}
              live={live}
              referenceHz={referenceHz}
              canChange={canChange}
              big={big}
              actions={actions}
            />
          ))}
    </div>
  );
}

/** What helps a failed save on; two versions are settled where both are shown. */
export function TroubleActions({ trouble, again }: { trouble: Trouble; again: () => void }) {
  if (trouble.kind === "stale") return null;
  return (
    <>
      {trouble.kind === "signed-out" ? (
        <LinkButton href="/sign-in" target="_blank" size="small">
          Sign in in a new tab
        </LinkButton>
      ) : null}
      <Button size="small" onClick={again}>
        Save again
      </Button>
    </>
  );
}

/** What is to be said of one partial, or nothing. */
export function PartialMatter({
  row,
  partial,
  live,
  referenceHz,
  canChange,
  big = false,
  actions,
}: {
  row: Row;
  partial: number;
  live: Live;
  referenceHz: number;
  canChange: boolean;
  big?: boolean | undefined;
  actions: NoteMattersActions;
}) {
  const key = rowKey(row.place);
  const fault = cellFault(row, partial);
  if (fault) {
    const isNumber = cellHz(row, partial, referenceHz) !== null;
    return (
      <Matter
        big={big}
        what={isNumber ? "" : `Partial ${partial}:`}
        why={isNumber ? fault : `${fault} Not saved yet.`}
        actions={
          isNumber && canChange ? (
            <Button size={big ? "normal" : "small"} onClick={() => actions.confirm(key, partial)}>
              It is as typed
            </Button>
          ) : null
        }
      />
    );
  }
  const question = live.questions.find((one) => one.partial === partial);
  if (question) {
    const { what, why } = questionWords(question);
    return (
      <Matter
        big={big}
        what={what}
        why={`${why} Correct it, or say that it is so.`}
        actions={
          canChange ? (
            <Button size={big ? "normal" : "small"} onClick={() => actions.confirm(key, partial)}>
              It is as typed
            </Button>
          ) : null
        }
      />
    );
  }
  const rejection = live.fit?.rejected.find((one) => one.partial === partial);
  const keptByHand = row.kept.includes(partial);
  if (!rejection && !keptByHand) return null;
  const words = rejection
    ? rejectionWords(rejection)
    : { what: `Partial ${partial} is kept by hand.`, why: "It counts in the fit whatever its distance." };
  return (
    <Matter
      big={big}
      what={words.what}
      why={words.why}
      quiet={!rejection}
      actions={
        canChange ? (
          <Segmented
            label={`Partial ${partial}`}
            big={big}
            className={big ? "w-full" : undefined}
            options={[
              { value: "keep", label: "Keep" },
              { value: "drop", label: "Drop" },
            ]}
            value={rejection ? "drop" : "keep"}
            onChange={(choice) => actions.judge(key, partial, choice === "keep")}
          />
        ) : null
      }
    />
  );
}

function Matter({
  what,
  why,
  actions,
  quiet = false,
  big = false,
}: {
  what: string;
  why?: string;
  actions?: React.ReactNode;
  quiet?: boolean;
  big?: boolean;
}) {
  return (
    <div className={big ? "grid gap-2" : "flex items-center gap-x-4 gap-y-1.5 max-lg:flex-wrap"}>
      <p className={big ? "text-16" : "flex min-w-0 flex-1 items-start gap-2.5 max-lg:min-w-80"}>
        {big ? null : (
          <span className="flex h-lh items-center">
            <Sign name={quiet ? "tick" : "attention"} className={quiet ? "text-ink-soft" : "text-rust"} />
          </span>
        )}
        <span>
          {what ? (
            <b className="font-semibold">
              <SharpText text={what} />
            </b>
          ) : null}
          {why ? (
            <>
              {" "}
              <SharpText text={why} />
            </>
          ) : null}
        </span>
      </p>
      {actions ? <div className="flex shrink-0 flex-wrap items-center gap-2">{actions}</div> : null}
    </div>
  );
}
