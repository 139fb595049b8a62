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
  onType: ChangeEventHandler<HTMLInputElement>;
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
        big ? "h-11 pr-4 text-16" : "h-7.5 pr-1.5 pl-0 text-14 max-lg:h-11 max-lg:pr-1 max-lg:text-16",
        looks[look],
      )}
    />
  );
});
