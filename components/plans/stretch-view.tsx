"use client";

import { useSearchParams } from "next/navigation";
import { useMemo, useState } from "react";
import { KeyPlots } from "@/components/charts/key-plots";
import { SharpText } from "@/components/charts/note-name";
import { NumbersTable } from "@/components/charts/plot-table";
import { ActionStrip } from "@/components/shell/action-strip";
import { WorkHead } from "@/components/shell/spread";
import { Button } from "@/components/ui/button";
import { StateWord } from "@/components/ui/state-word";
import { ErrorState } from "@/components/ui/states";
import type { Temperament } from "@/lib/acoustics/types";
import type { PlanChoices } from "@/lib/plans/keys";
import { addressOf, planInAddress, styleRefs, temperamentValue } from "@/lib/plans/plan-address";
import { temperamentName } from "@/lib/plans/rules";
import type { AnalysisRecord, StyleList } from "@/lib/plans/schema";
import { adviceSentence } from "./advice-words";
import { keyMarks, planTable, stretchPlot } from "./analysis-plots";
import { BeatsSection } from "./beats-section";
import { FlaggedNotes } from "./flagged-notes";
import { KeptPlans } from "./kept-plans";
import { KeyReadout } from "./key-readout";
import { PlanChoiceFields } from "./plan-choices";
import { SheetChoice, type SheetOption } from "./sheet-choice";
import { useAnalysis } from "./use-analysis";
import { useSavePlan } from "./use-save-plan";

type Props = {
  analysis: AnalysisRecord;
  instrument: {
    id: string;
    firstMidi: number;
    lastMidi: number;
    temperament: Temperament;
    referenceHz: number;
  };
  sheet: { id: string; words: string; found: string; jobId: string | null };
  sheets: readonly SheetOption[];
  styles: StyleList;
  canSave: boolean;
  /** Why this person cannot save, where they cannot. */
  whyNot: string;
  locale: string;
  timeZone: string;
};

export function StretchView(props: Props) {
  const { analysis: initial, instrument, sheet, sheets, styles } = props;
  const { choices, faults, choose } = useChoicesInAddress(instrument, styles);
  const untouched =
    choices.style === initial.style.ref &&
    choices.temperament === temperamentValue(initial.temperament) &&
    choices.referenceHz === initial.referenceHz;
  const {
    data: analysis = initial,
    error,
    refetch,
    isPlaceholderData,
  } = useAnalysis(sheet.id, choices, untouched ? initial : undefined);
  const save = useSavePlan(sheet.id, sheet.jobId);
  const [cursor, setCursor] = useState(69);
  const plots = useMemo(
    () => [{ ...stretchPlot(analysis, sheet.found), height: 320 }],
    [analysis, sheet.found],
  );
  const marks = useMemo(() => keyMarks(analysis), [analysis]);

  const saveButton = (
    <Button
      kind="primary"
      busy={save.isPending}
      busyLabel="Saving"
      onClick={() => save.mutate(choices)}
      {...(props.canSave ? {} : { disabledReason: props.whyNot })}
    >
      {sheet.jobId ? "Save as the visit's plan" : "Save plan"}
    </Button>
  );

  return (
    <>
      <WorkHead
        title="Stretch plan"
        summary={
          <>
            {analysis.style.name},{" "}
            {analysis.temperament === "equal" ? "equal" : temperamentName(analysis.temperament)} temperament,
            from {sheet.words}. <SharpText text={adviceSentence(analysis)} />
          </>
        }
        actions={<span className="contents max-lg:hidden">{saveButton}</span>}
      />
      <PlanChoiceFields
        styles={styles}
        instrumentTemperament={instrument.temperament}
        chosen={choices}
        onChange={choose}
      />
      {faults.map((fault) => (
        <p key={fault} className="mt-3">
          <StateWord kind="attention" wrap>
            {fault} The plan below is drawn with the usual one.
          </StateWord>
        </p>
      ))}
      {error ? (
        <ErrorState
          title="The plan was not computed"
          action={<Button onClick={() => refetch()}>Try again</Button>}
        >
          {error.message} The last plan is still shown.
        </ErrorState>
      ) : null}
      <div className="mt-6" aria-busy={isPlaceholderData}>
        <KeyPlots
          range={{ ...instrument, breakMidi: analysis.breakMidi }}
          plots={plots}
          marks={marks}
          cursor={cursor}
          onCursor={setCursor}
          tables="hidden"
        >
          <KeyReadout analysis={analysis} midi={cursor} canRead={false} />
        </KeyPlots>
      </div>
      <NumbersTable title="Targets" table={planTable(analysis)} cursor={cursor} onCursor={setCursor} />
      <p className="lab mt-2 max-w-160">
        In the bass listen to the named partial: the first partial there is weak and off its place.
      </p>
      <FlaggedNotes analysis={analysis} />
      <BeatsSection analysis={analysis} />
      <KeptPlans sheetId={sheet.id} locale={props.locale} timeZone={props.timeZone} />
      <div className="mt-6">
        <SheetChoice sheets={sheets} value={sheet.id} />
      </div>
      <ActionStrip>{saveButton}</ActionStrip>
    </>
  );
}

/** What is chosen stands in the address; what is not there is the instrument's and the shop's habit. */
function useChoicesInAddress(instrument: Props["instrument"], styles: StyleList) {
  const search = useSearchParams();
  const known = { styles: styleRefs(styles) };
  const habit: Required<PlanChoices> = {
    style: styles.defaultStyle,
    temperament: temperamentValue(instrument.temperament),
    referenceHz: instrument.referenceHz,
  };
  const { choices: asked, faults } = planInAddress(search, known);
  const choices: Required<PlanChoices> = { ...habit, ...asked };
  const choose = (change: PlanChoices, again: boolean) => {
    // From the address as it is by now: the page is drawn after it, and two changes may come quickly.
    const now = new URLSearchParams(window.location.search);
    const next = { ...habit, ...planInAddress(now, known).choices, ...change };
    const address = `${window.location.pathname}${addressOf(now, next, habit)}`;
    // The browser's own history: the page need not be asked for anew, only the plan.
    if (again) window.history.replaceState(null, "", address);
    else window.history.pushState(null, "", address);
  };
  return { choices, faults, choose };
}
