import { cursorRings, type Scene } from "./plot-scene";

/**
 * The string of the cursor through one plot: under the canvas, so that marks and words stand in front of it; the
 * rings are in front. No easing: it follows the hand.
 */

export function CursorString({ scene, midi }: { scene: Scene; midi: number }) {
  const x = scene.area.x + scene.layout.x(midi);
  const end = scene.last ? scene.height : scene.area.y + scene.area.height;
  return (
    <svg width={scene.width} height={scene.height} aria-hidden="true" className="absolute inset-0">
      <path d={`M${x} ${scene.area.y}V${end}`} stroke="var(--brass-fill)" strokeWidth={1.5} />
      {scene.first && <Stud x={x} y={scene.area.y} />}
    </svg>
  );
}

function Stud({ x, y }: { x: number; y: number }) {
  return (
    <>
      <rect x={x - 4} y={y - 6} width={8} height={14} rx={4} fill="var(--brass-fill)" />
      <circle cx={x} cy={y + 1} r={1.8} fill="var(--sheet)" />
    </>
  );
}

export function CursorRings({ scene, midi }: { scene: Scene; midi: number }) {
  return (
    <svg
      width={scene.width}
      height={scene.height}
      aria-hidden="true"
      className="pointer-events-none absolute inset-0"
    >
      {cursorRings(scene, midi).map((ring) => (
        <circle
          key={`${ring.y} ${ring.around}`}
          cx={ring.x}
          cy={ring.y}
          r={ring.around ? 7 : 4}
          fill={ring.around ? "none" : "var(--sheet)"}
          stroke="var(--brass)"
          strokeWidth={2}
        />
      ))}
    </svg>
  );
}
