import { centsWithBand, exponentOfB, hertz, inharmonicity } from "@/components/charts/format";
import { CursorHint, Readout, TimesTenTo } from "@/components/charts/readout";
import type { AnalysisRecord } from "@/lib/plans/schema";
import { halfBand } from "./analysis-plots";

/** The numbers of the key in hand, under the ribbon. */
export function KeyReadout({
  analysis,
  midi,
  canRead,
}: {
  analysis: AnalysisRecord;
  midi: number;
  /** Whether Enter begins a reading of the key. */
  canRead: boolean;
}) {
  const key = analysis.keys.find((estimate) => estimate.midi === midi);
  const note = analysis.notes.find((planned) => planned.midi === midi);
  if (!key || !note) return null;
  const bridge = midi < analysis.breakMidi ? "bass bridge" : "treble bridge";
  const source = key.flag === null ? key.source : "does not belong";
  const exponent = Math.max(-4, exponentOfB(key.b) - 1);
  return (
    <Readout
      midi={midi}
      noteWidth={236}
      about={`${bridge}, ${source}`}
      cells={[
        {
          key: "b",
          label: (
            <>
              <TimesTenTo exponent={exponent} />
              <span className="hidden @xl:inline">, all notes</span>
            </>
          ),
          value: inharmonicity(key.b, halfBand(key), exponent),
          width: 156,
        },
        {
          key: "stretch",
          label: "Stretch, cents",
          value: centsWithBand(note.stretchCents, note.bandCents),
          width: 140,
        },
        { key: "target", label: "Target, Hz", value: hertz(note.targetHz), width: 124 },
        ...(canRead
          ? []
          : [
              {
                key: "listen",
                label: `Partial ${note.listenPartial}, Hz`,
                value: hertz(note.listenHz),
                width: 124,
                deskOnly: true,
              },
            ]),
      ]}
      hint={<CursorHint {...(canRead ? { enter: "read it" } : {})} />}
    />
  );
}
