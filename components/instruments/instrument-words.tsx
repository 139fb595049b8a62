import { NoteName } from "@/components/charts/note-name";
import { temperamentLabels } from "@/lib/instruments/rules";
import type { InstrumentRecord } from "@/lib/instruments/schema";

export function temperamentWords(temperament: InstrumentRecord["temperament"]): string {
  return typeof temperament === "string" ? temperamentLabels[temperament] : "Own, twelve offsets";
}

export function KeysWords({ firstMidi, lastMidi }: { firstMidi: number; lastMidi: number }) {
  return (
    <>
      {lastMidi - firstMidi + 1}, <NoteName midi={firstMidi} /> to <NoteName midi={lastMidi} />
    </>
  );
}

/** The last note of the bass bridge and the first of the treble bridge, as "E2 | F2". */
export function BreakWords({ breakMidi }: { breakMidi: number | null }) {
  if (breakMidi === null) return <span className="text-ink-soft">not looked for yet</span>;
  return (
    <>
      <NoteName midi={breakMidi - 1} /> <span aria-hidden="true">|</span>
      <span className="sr-only"> and </span> <NoteName midi={breakMidi} />
    </>
  );
}
