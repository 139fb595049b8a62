"use client";

import { useRef, useState } from "react";
import { BandProgress } from "@/components/charts/band-progress";
import { fixed } from "@/components/charts/format";
import type { KeyMark } from "@/components/charts/key-mark";
import { KeyboardRibbon } from "@/components/charts/keyboard-ribbon";
import { NoteName } from "@/components/charts/note-name";
import { PageSection } from "@/components/shell/page-section";
import { LeftPage } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { cx } from "@/components/ui/class-names";
import { Facts } from "@/components/ui/facts";
import { Note } from "@/components/ui/note";
import { Sign } from "@/components/ui/sign";
import { StateWord } from "@/components/ui/state-word";
import { showDayOf, showInstant } from "@/lib/dates";
import type { SheetRecord } from "@/lib/readings/schema";
import { enoughWords, type NextNote, WORTHWHILE_CENTS } from "./band-steps";
import { stageTitle } from "./stage-title";
import type { BandSteps } from "./use-band-steps";

export type SheetInstrument = {
  id: string;
  name: string;
  firstMidi: number;
  lastMidi: number;
  breakMidi: number | null;
};

export type Clock = { locale: string; timeZone: string; demo: boolean };

type Props = {
  sheet: SheetRecord;
  instrument: SheetInstrument;
  clock: Clock;
  kept: React.ReactNode;
  notesRead: number;
  keys: { breakMidi: number | null; marks: readonly KeyMark[]; inHand: number | null };
  steps: BandSteps | null;
  enough: boolean;
  /** Absent where the sheet may only be read. */
  onChoose?: ((midi: number) => void) | undefined;
};

/** The left page of a sheet: its circumstances, what is read, and what to read next. */
export function SheetAbout(props: Props) {
  const { sheet, instrument, clock, kept, notesRead, keys, steps, enough, onChoose } = props;
  const room = [
    sheet.humidityPercent === null ? null : `${sheet.humidityPercent} % humidity`,
    sheet.temperatureC === null ? null : `${String(sheet.temperatureC).replace("-", "−")} °C`,
  ].filter((part) => part !== null);
  return (
    <LeftPage
      crumb={[
        { label: "Instruments", href: "/instruments" },
        { label: instrument.name, href: `/instruments/${instrument.id}/sheets` },
      ]}
      title={stageTitle(sheet.stage)}
      subtitle={`Reading sheet, ${showInstant(sheet.takenAt, clock.locale, clock.timeZone)}`}
      fold="This sheet"
    >
      <Facts
        facts={[
          sheet.takenByName !== null && { name: "Read by", value: sheet.takenByName },
          room.length > 0 && { name: "Room", value: room.join(", ") },
          { name: "Reference", value: `A4 = ${sheet.referenceHz} Hz` },
          sheet.visitId !== null && {
            name: "Visit",
            value: (
              <AppLink className="link" href={`/visits/${sheet.visitId}`}>
                {showDayOf(sheet.takenAt, clock.locale, clock.timeZone)}
              </AppLink>
            ),
          },
          { name: "Kept", value: kept },
          sheet.archivedAt !== null && {
            name: "Archived",
            value: (
              <StateWord kind="stopped">
                {showDayOf(sheet.archivedAt, clock.locale, clock.timeZone)}
              </StateWord>
            ),
          },
        ]}
      />
      {sheet.remarks ? <Note>{sheet.remarks}</Note> : null}
      {sheet.canChange ? (
        <p className="-mt-4">
          <AppLink className="link link-alone" href={`/instruments/${instrument.id}/sheets/${sheet.id}/edit`}>
            Change the circumstances
          </AppLink>
        </p>
      ) : null}
      <PageSection
        title="Notes read"
        aside={`${notesRead} of ${instrument.lastMidi - instrument.firstMidi + 1}`}
      >
        <ChoosingRibbon instrument={instrument} keys={keys} onChoose={onChoose} height={36} labels />
      </PageSection>
      {onChoose ? (
        <PageSection title="Measure next">
          <MeasureNext steps={steps} enough={enough} onChoose={onChoose} />
        </PageSection>
      ) : null}
    </LeftPage>
  );
}

/** A press on a key opens its note; the arrow keys only look for one, and Enter opens it. */
export function ChoosingRibbon({
  instrument,
  keys,
  onChoose,
  height,
  labels,
}: {
  instrument: SheetInstrument;
  keys: Props["keys"];
  onChoose?: ((midi: number) => void) | undefined;
  height: number;
  labels: boolean;
}) {
  const [sought, setSought] = useState<number | null>(null);
  const newest = useRef<number | null>(null);
  const cursor = sought ?? keys.inHand;
  newest.current = cursor;
  const common = {
    firstMidi: instrument.firstMidi,
    lastMidi: instrument.lastMidi,
    breakMidi: keys.breakMidi,
    marks: keys.marks,
    height,
    labels,
    label: "Notes of this sheet",
  };
  if (!onChoose) return <KeyboardRibbon {...common} cursor={keys.inHand} />;
  const choose = (midi: number | null) => {
    setSought(null);
    if (midi !== null) onChoose(midi);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: the ribbon inside is the control; this only tells a press from a key
    <div onPointerUp={() => choose(newest.current)} onBlur={() => setSought(null)}>
      <KeyboardRibbon
        {...common}
        cursor={cursor}
        onCursor={(midi) => {
          newest.current = midi;
          setSought(midi);
        }}
        onEnter={choose}
      />
    </div>
  );
}

function MeasureNext({
  steps,
  enough,
  onChoose,
}: {
  steps: BandSteps | null;
  enough: boolean;
  onChoose: (midi: number) => void;
}) {
  if (!steps) return <p className="lab">Working out what to read next.</p>;
  const { read, chain } = steps;
  const now = read.at(-1)?.notes ?? 0;
  const predicted = chain.map(({ toCents }, index) => ({ notes: now + index + 1, meanBandCents: toCents }));
  return (
    <>
      {chain.length > 0 ? (
        <ul>
          {chain.slice(0, 3).map((next, index) => (
            <NextLine key={next.midi} next={next} first={index === 0} onChoose={onChoose} />
          ))}
        </ul>
      ) : null}
      {read.length + predicted.length > 1 ? (
        <>
          <p className="lab mt-5 mb-2">Mean 95 % band of the plan, ± cents, against notes read</p>
          <BandProgress read={read} predicted={predicted} />
        </>
      ) : null}
      <p className="lab mt-2">{enoughWords(chain, enough)}</p>
    </>
  );
}

function NextLine({
  next,
  first,
  onChoose,
}: {
  next: NextNote;
  first: boolean;
  onChoose: (midi: number) => void;
}) {
  const gain = next.fromCents - next.toCents;
  return (
    <li>
      <button
        type="button"
        onClick={() => onChoose(next.midi)}
        className={cx(
          "flex h-9 w-full items-center border-b border-hairline pr-2 pl-3 text-left hover:bg-cover touch:h-11",
          first && "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)]",
        )}
      >
        <span className="serif w-13 shrink-0 text-19">
          <NoteName midi={next.midi} />
        </span>
        <span className="text-ink-soft">{gain < WORTHWHILE_CENTS ? "not needed" : "mean band"}</span>
        <span className="ml-auto inline-flex items-center gap-1.5 whitespace-nowrap">
          <span className="text-ink-soft">± {fixed(next.fromCents, 1)}</span>
          <Sign name="arrow-right" size={12} className="text-ink-soft" label="would become" />
          <b className="font-semibold">± {fixed(next.toCents, 1)}</b>
        </span>
      </button>
    </li>
  );
}
