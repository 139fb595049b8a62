import type { ReactNode } from "react";
import { PowerOfTen } from "@/components/ui/glyphs";
import { Kbd } from "@/components/ui/kbd";
import { NoteName } from "./note-name";

/**
 * The numbers of the key in hand, under the ribbon. Columns depend on the width of the page and on what they are
 * told, never on what stands in them, so nothing moves while the cursor does. Where room is short the hint goes
 * first, then the cells for the desk, then the words beside the note.
 */

export type ReadoutCell = {
  key: string;
  label: ReactNode;
  value: ReactNode;
  /** Width on the desk in pixels, at most; the last cell takes what is left when it has none. */
  width?: number;
  /** Left out on the phone and on a narrow page, where three cells have room. */
  deskOnly?: boolean;
  /** A size smaller, for words instead of a number. */
  small?: boolean;
};

type Props = {
  midi: number;
  /** What the key is: "plain, predicted". */
  about?: ReactNode;
  cells: readonly ReadoutCell[];
  /** Keys to press, at the right end; only where there is a keyboard. */
  hint?: ReactNode;
  noteWidth?: number;
};

export function Readout({ midi, about, cells, hint, noteWidth = 200 }: Props) {
  const onPhone = cells.filter((cell) => !cell.deskOnly);
  return (
    <div className="@container">
      <div
        className="grid items-end gap-y-1 border-hairline border-t pt-2 [grid-template-columns:var(--phone)] @xl:h-16 @xl:items-center @xl:border-b @xl:pt-0 @xl:[grid-template-columns:var(--page)] @min-[50rem]:[grid-template-columns:var(--desk)]"
        style={
          {
            "--page": columnsOf(onPhone, noteWidth, false),
            "--desk": columnsOf(cells, noteWidth, hint !== undefined),
            "--phone": phoneColumns(onPhone.length),
          } as React.CSSProperties
        }
      >
        <div className="flex min-w-0 items-baseline gap-3 @xl:pr-3">
          <span className="whitespace-nowrap font-medium font-serif text-28 leading-10 @xl:text-23">
            <NoteName midi={midi} />
          </span>
          {about && <span className="hidden min-w-0 truncate text-12 text-ink-soft @xl:block">{about}</span>}
        </div>
        {cells.map((cell) => (
          <div
            key={cell.key}
            className={`min-w-0 border-hairline @xl:border-l @xl:pl-4 @xl:not-last:pr-4 ${cell.deskOnly ? "hidden @min-[50rem]:block" : ""}`}
          >
            <div className="pr-1 text-12 text-ink-soft @xl:truncate @xl:pr-0">{cell.label}</div>
            <div
              className={`truncate font-medium proportional-nums @xl:tabular-nums ${cell.small ? "text-14" : "text-14 @sm:text-16"}`}
            >
              {cell.value}
            </div>
          </div>
        ))}
        {hint && (
          <div className="hidden items-center justify-end gap-1.5 whitespace-nowrap border-hairline border-l pl-4 text-12 text-ink-soft @min-[55rem]:flex">
            {hint}
          </div>
        )}
      </div>
      {about && <p className="mt-1 text-12 text-ink-soft @xl:hidden">{about}</p>}
    </div>
  );
}

/** The hint is as wide as it is; the note's words give way before the numbers do. */
function columnsOf(cells: readonly ReadoutCell[], noteWidth: number, hint: boolean): string {
  const fills = hint || cells.some((cell) => !cell.width);
  const note = fills ? `minmax(96px,${noteWidth}px)` : "minmax(96px,1fr)";
  const widths = cells.map((cell) => (cell.width ? `minmax(0,${cell.width}px)` : "minmax(0,1fr)"));
  return [note, ...widths, ...(hint ? ["minmax(max-content,1fr)"] : [])].join(" ");
}

/** The first number is the longest. */
function phoneColumns(count: number): string {
  return ["60px", "minmax(0,1.08fr)", ...Array.from({ length: count - 1 }, () => "minmax(0,1fr)")].join(" ");
}

/** "B × 10⁻⁴", with a raised exponent. */
export function TimesTenTo({ exponent, of = "B" }: { exponent: number; of?: string }) {
  return (
    <>
      {of} <PowerOfTen exponent={exponent} />
    </>
  );
}

const ARROWS = {
  left: "M12 7H3M6.5 3.2L2.5 7l4 3.8",
  right: "M2 7h9M7.5 3.2L11.5 7l-4 3.8",
} as const;

/** The usual hint: arrow keys move, Enter does what the page says. */
export function CursorHint({ enter }: { enter?: string }) {
  return (
    <>
      {(["left", "right"] as const).map((way) => (
        <Kbd key={way}>
          <svg width={10} height={16} viewBox="0 0 14 14" role="img" aria-label={`${way} arrow`}>
            <path d={ARROWS[way]} fill="none" stroke="currentColor" strokeWidth={1.5} />
          </svg>
        </Kbd>
      ))}
      move
      {enter && (
        <>
          <span className="w-1" />
          <Kbd>Enter</Kbd>
          {enter}
        </>
      )}
    </>
  );
}
