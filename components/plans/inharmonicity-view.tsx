"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { KeyPlots } from "@/components/charts/key-plots";
import { SharpText } from "@/components/charts/note-name";
import { noteText } from "@/components/charts/note-spelling";
import { ActionStrip } from "@/components/shell/action-strip";
import { WorkHead } from "@/components/shell/spread";
import { Button, LinkButton } from "@/components/ui/button";
import { StateWord } from "@/components/ui/state-word";
import type { AnalysisRecord } from "@/lib/plans/schema";
import { adviceSentence } from "./advice-words";
import { flaggedKeys, flagWords, inharmonicityPlot, keyMarks, stretchPlot } from "./analysis-plots";
import { KeyReadout } from "./key-readout";
import { SheetChoice, type SheetOption } from "./sheet-choice";
import { useAnalysis } from "./use-analysis";

type Props = {
  analysis: AnalysisRecord;
  instrument: { id: string; firstMidi: number; lastMidi: number };
  sheet: { id: string; words: string; notesRead: number; found: string };
  sheets: readonly SheetOption[];
  canRead: boolean;
};

/** Measured and predicted B over the keys, with the plan it leads to under it. */
export function InharmonicityView({ analysis: initial, instrument, sheet, sheets, canRead }: Props) {
  const router = useRouter();
  const { data: analysis = initial } = useAnalysis(sheet.id, {}, initial);
  const flagged = flaggedKeys(analysis);
  const [cursor, setCursor] = useState(flagged[0]?.midi ?? 60);
  const [numbers, setNumbers] = useState(false);
  const plots = useMemo(
    () => [
      inharmonicityPlot(analysis),
      {
        ...stretchPlot(analysis, sheet.found),
        height: 188,
        aside: (
          <>
            House style <b className="font-semibold text-ink">{analysis.style.name}</b>
          </>
        ),
      },
    ],
    [analysis, sheet.found],
  );
  const marks = useMemo(() => keyMarks(analysis), [analysis]);
  const sheetHref = `/instruments/${instrument.id}/sheets/${sheet.id}`;
  const next = flagged[0]?.midi ?? analysis.advice.next[0]?.midi;
  const readNext =
    canRead && next !== undefined ? (
      <LinkButton kind="primary" href={`${sheetHref}?note=${next}`}>
        <span>
          Read <SharpText text={noteText(next)} /> {flagged.length > 0 ? "again" : "next"}
        </span>
      </LinkButton>
    ) : null;
  const planHref = `/instruments/${instrument.id}/stretch?sheet=${sheet.id}`;

  return (
    <>
      <WorkHead
        title="Inharmonicity and stretch"
        summary={
          <>
            {sheet.notesRead === 1 ? "1 note" : `${sheet.notesRead} notes`} fitted, {sheet.words}.{" "}
            <SharpText text={adviceSentence(analysis)} />
          </>
        }
        actions={
          <>
            <Button kind="quiet" aria-expanded={numbers} onClick={() => setNumbers(!numbers)}>
              {numbers ? "Hide numbers" : "Numbers"}
            </Button>
            <LinkButton href={planHref} className="max-lg:hidden">
              Stretch plan
            </LinkButton>
            <span className="contents max-lg:hidden">{readNext}</span>
          </>
        }
      />
      <KeyPlots
        range={{ ...instrument, breakMidi: analysis.breakMidi }}
        plots={plots}
        marks={marks}
        cursor={cursor}
        onCursor={setCursor}
        {...(canRead ? { onEnter: (midi) => router.push(`${sheetHref}?note=${midi}` as Route) } : {})}
        tables={numbers ? "shown" : "hidden"}
      >
        <KeyReadout analysis={analysis} midi={cursor} canRead={canRead} />
      </KeyPlots>
      {flagged.length > 0 ? (
        <ul className="mt-3 grid gap-1" aria-label="Notes that do not belong">
          {flagged.map((key) => (
            <li key={key.midi}>
              <StateWord kind="attention" wrap>
                <SharpText text={`${noteText(key.midi)} does not belong: ${flagWords(key)}`} />{" "}
                <span className="font-normal text-ink">
                  Wrong wire, rust or another key sounding? Read it again.
                </span>
              </StateWord>
            </li>
          ))}
        </ul>
      ) : null}
      <p className="lab mt-3 max-w-160">
        {breakWords(analysis)} Bands and ± are 95 % and weigh all notes of the sheet together, so a note's ±
        is smaller here than on its reading sheet, where it stands for that note's readings alone. Figures
        come from the readings typed in; they do not prove that a string is sound.
      </p>
      <div className="mt-4">
        <SheetChoice sheets={sheets} value={sheet.id} />
      </div>
      <ActionStrip>
        <LinkButton href={planHref}>Stretch plan</LinkButton>
        {readNext}
      </ActionStrip>
    </>
  );
}

function breakWords({ breakSource, priorOnly }: AnalysisRecord): string {
  if (priorOnly) return "Nothing is read yet: this is what pianos are like, not this one.";
  if (breakSource === "given") return "The break is the instrument's record.";
  if (breakSource === "inferred") return "The break is inferred from the readings.";
  return "The break is assumed: enter it in the record.";
}
