import type { Metadata } from "next";
import { NoSheetYet } from "@/components/plans/no-sheet-yet";
import { StretchView } from "@/components/plans/stretch-view";
import { may } from "@/lib/auth/access";
import { getInstrument } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { sheetInHand } from "@/lib/plans/page-data";
import { getAnalysis } from "@/lib/plans/service";
import { getStyles } from "@/lib/plans/styles/service";
import { stageWords } from "@/lib/readings/stage-words";

export const metadata: Metadata = { title: "Stretch plan" };

export default async function StretchPage({ params, searchParams }: PageProps<"/instruments/[id]/stretch">) {
  const actor = await staffActor();
  const { id } = await params;
  const { sheet: wanted } = await searchParams;
  const instrument = await getInstrument(actor, id);
  const { chosen, options, name, canRead, clock } = await sheetInHand(
    actor,
    id,
    typeof wanted === "string" ? wanted : undefined,
  );
  if (!chosen) return <NoSheetYet instrumentId={id} canBegin={may(actor.role, "sheets.change")} />;
  return (
    <StretchView
      key={chosen.id}
      analysis={await getAnalysis(actor, chosen.id, {})}
      instrument={{
        id,
        firstMidi: instrument.firstMidi,
        lastMidi: instrument.lastMidi,
        temperament: instrument.temperament,
      }}
      sheet={{ id: chosen.id, words: name(chosen), found: stageWords[chosen.stage], jobId: chosen.jobId }}
      sheets={options}
      styles={await getStyles(actor)}
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
