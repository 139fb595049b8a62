import type { Metadata } from "next";
import { NoSheetYet } from "@/components/plans/no-sheet-yet";
import { StretchView } from "@/components/plans/stretch-view";
import { may } from "@/lib/auth/access";
import { getInstrument } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { sheetInHand } from "@/lib/plans/page-data";
import { planInAddress, styleRefs } from "@/lib/plans/plan-address";
import { analysisQuery } from "@/lib/plans/schema";
import { getAnalysis } from "@/lib/plans/service";
import { getStyles } from "@/lib/plans/styles/service";
import { stageWords } from "@/lib/readings/stage-words";

export const metadata: Metadata = { title: "Stretch plan" };

export default async function StretchPage({ params, searchParams }: PageProps<"/instruments/[id]/stretch">) {
  const actor = await staffActor();
  const { id } = await params;
  const asked = await searchParams;
  const { sheet: wanted } = asked;
  const instrument = await getInstrument(actor, id);
  const { chosen, options, name, canRead, clock } = await sheetInHand(
    actor,
    id,
    typeof wanted === "string" ? wanted : undefined,
  );
  if (!chosen) return <NoSheetYet instrumentId={id} canBegin={may(actor.role, "sheets.change")} />;
  const styles = await getStyles(actor);
  const { choices } = planInAddress(new URLSearchParams(onlyTexts(asked)), { styles: styleRefs(styles) });
  return (
    <StretchView
      key={chosen.id}
      analysis={await getAnalysis(actor, chosen.id, analysisQuery.parse(choices))}
      instrument={{
        id,
        firstMidi: instrument.firstMidi,
        lastMidi: instrument.lastMidi,
        temperament: instrument.temperament,
        referenceHz: instrument.referenceHz,
      }}
      sheet={{ id: chosen.id, words: name(chosen), found: stageWords[chosen.stage], jobId: chosen.jobId }}
      sheets={options}
      styles={styles}
      canSave={canRead}
      whyNot={
        may(actor.role, "plans.change")
          ? "This sheet belongs to a visit you are not on."
          : "Plans are kept by technicians and owners."
      }
      locale={clock.locale}
      timeZone={clock.timeZone}
    />
  );
}

/** The parameters given once; one given twice says nothing. */
function onlyTexts(asked: Record<string, string | string[] | undefined>): Record<string, string> {
  return Object.fromEntries(
    Object.entries(asked).flatMap(([name, value]) => (typeof value === "string" ? [[name, value]] : [])),
  );
}
