import type { KeyLayout, KeyShape } from "./key-geometry";
import type { KeyMark } from "./key-mark";

type Props = {
  layout: KeyLayout;
  height: number;
  blackHeight: number;
  marks: readonly KeyMark[];
  cursor: number | null;
};

/** What is known of each key, drawn low on the key itself. Shape says what colour says. */
export function RibbonMarks({ layout, height, blackHeight, marks, cursor }: Props) {
  const keys = new Map(layout.keys.map((key) => [key.midi, key]));
  const small = layout.pitch < 6;
  return marks.map((mark) => {
    const key = keys.get(mark.midi);
    if (!key) return null;
    const x = key.x + key.width / 2;
    const y = key.black ? blackHeight - 5 : height - 6;
    if (mark.kind === "flagged") return <Triangle key={mark.midi} x={x} y={y} />;
    if (mark.kind === "next") {
      return (
        <circle
          key={mark.midi}
          cx={x}
          cy={y}
          r={small ? 2.3 : 3}
          fill="var(--key-brass)"
          stroke="var(--key-black)"
          strokeWidth={0.75}
        />
      );
    }
    return <circle key={mark.midi} cx={x} cy={y} r={small ? 1.3 : 2} fill={dotColour(key, cursor)} />;
  });
}

function dotColour(key: KeyShape, cursor: number | null): string {
  if (!key.black) return "var(--key-black)";
  return key.midi === cursor ? "var(--key-black)" : "var(--key-white)";
}

function Triangle({ x, y }: { x: number; y: number }) {
  return (
    <path
      d={`M${x} ${y - 4}l4.5 7h-9z`}
      fill="var(--key-rust)"
      stroke="var(--key-black)"
      strokeWidth={0.75}
    />
  );
}
