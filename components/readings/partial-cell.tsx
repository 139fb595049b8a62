import { type ChangeEventHandler, memo } from "react";
import { cx } from "@/components/ui/class-names";
import type { CellLook } from "./cell-look";
import { cellId } from "./use-cells";

export type PartialCellProps = {
  prefix: string;
  rowKey: string;
  partial: number;
  text: string;
  look: CellLook;
  label: string;
  /** Id of the words that explain the look. */
  describedBy?: string | undefined;
  tabStop: boolean;
  readOnly: boolean;
  big?: boolean;
  /** The size at which six figures fit the table's column. */
  figures?: Figures;
  onType: ChangeEventHandler<HTMLInputElement>;
};

export type Figures = 12 | 14 | 16;

const sizes: Record<Figures, { six: string; more: string }> = {
  12: { six: "pr-0.5 text-12", more: "pr-0.5 text-[11px]" },
  14: { six: "pr-1 text-14", more: "pr-1 text-12" },
  16: { six: "pr-1 text-16", more: "pr-1 text-14" },
};

const looks: Record<CellLook, string> = {
  plain: "text-ink",
  "left-out": "text-rust line-through decoration-1",
  asked: "bg-rust-wash text-rust shadow-[inset_0_0_0_1px_var(--rust)]",
  wrong: "bg-rust-wash text-rust shadow-[inset_0_0_0_1px_var(--rust)]",
};

/** One reading, always ready to be typed over. */
export const PartialCell = memo(function PartialCell(props: PartialCellProps) {
  const { prefix, rowKey, partial, text, look, label, describedBy, tabStop, readOnly, big, onType } = props;
  const { figures = 14 } = props;
  const size = sizes[figures][text.length > 6 ? "more" : "six"];
  return (
    <input
      id={cellId(prefix, rowKey, partial)}
      data-row={rowKey}
      data-partial={partial}
      value={text}
      onChange={onType}
      readOnly={readOnly}
      tabIndex={tabStop ? 0 : -1}
      type="text"
      inputMode="decimal"
      autoComplete="off"
      autoCorrect="off"
      spellCheck={false}
      placeholder="·"
      aria-label={label}
      aria-invalid={look === "wrong" || look === "asked" || undefined}
      aria-describedby={describedBy}
      className={cx(
        "block w-full rounded bg-transparent text-right outline-none focus:bg-sheet focus:text-ink focus:no-underline focus:shadow-[inset_0_0_0_2px_var(--brass)]",
        big ? "h-11 pr-4 text-16" : cx("h-7.5 pl-0 max-lg:h-11", size),
        looks[look],
      )}
    />
  );
});
