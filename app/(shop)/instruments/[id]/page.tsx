import { InharmonicityView } from "@/components/plans/inharmonicity-view";
import { NoSheetYet } from "@/components/plans/no-sheet-yet";
import { may } from "@/lib/auth/access";
import { getInstrument } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { sheetInHand } from "@/lib/plans/page-data";
import { getAnalysis } from "@/lib/plans/service";
import { stageWords } from "@/lib/readings/stage-words";

export default async function InharmonicityPage({ params, searchParams }: PageProps<"/instruments/[id]">) {
  const actor = await staffActor();
  const { id } = await params;
  const { sheet: wanted } = await searchParams;
  const instrument = await getInstrument(actor, id);
  const { chosen, options, name, canRead } = await sheetInHand(
    actor,
    id,
    typeof wanted === "string" ? wanted : undefined,
  );
  if (!chosen) return <NoSheetYet instrumentId={id} canBegin={may(actor.role, "sheets.change")} />;
  return (
    <InharmonicityView
      key={chosen.id}
      analysis={await getAnalysis(actor, chosen.id, {})}
      instrument={{ id, firstMidi: instrument.firstMidi, lastMidi: instrument.lastMidi }}
      sheet={{
        id: chosen.id,
        words: name(chosen),
        notesRead: chosen.notesRead,
        found: stageWords[chosen.stage],
      }}
      sheets={options}
      canRead={canRead}
    />
  );
}
