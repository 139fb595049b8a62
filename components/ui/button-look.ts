import { cx } from "./class-names";

export type ButtonKind = "primary" | "secondary" | "quiet" | "danger";
export type ButtonSize = "small" | "normal" | "big";

const base =
  "inline-flex items-center justify-center gap-2 rounded border font-semibold whitespace-nowrap select-none no-underline";

/** "small" belongs inside rows; "big" (52 px) is the next action under the thumb. */
const sizes: Record<ButtonSize, string> = {
  small: "h-7 px-2.5 text-12 touch:h-11 touch:px-3.5 touch:text-14",
  normal: "h-9 text-14 touch:h-11 touch:min-w-11",
  big: "h-13 w-full px-4 text-16",
};

const kinds: Record<ButtonKind, string> = {
  primary: "border-transparent bg-felt-fill text-on-felt hover:bg-felt-press active:bg-felt-press",
  secondary: "border-edge text-ink hover:bg-cover active:bg-cover",
  quiet: "border-transparent text-iron hover:bg-iron-wash active:bg-iron-wash",
  danger: "border-rust text-rust hover:bg-rust-wash active:bg-rust-wash",
};

const unusable = "cursor-not-allowed border-transparent bg-cover font-medium text-ink-soft";

export function buttonLook(
  kind: ButtonKind = "secondary",
  size: ButtonSize = "normal",
  options: { disabled?: boolean; className?: string } = {},
): string {
  return cx(
    base,
    sizes[size],
    size === "normal" && (kind === "quiet" ? "px-2" : "px-4"),
    options.disabled ? unusable : kinds[kind],
    options.className,
  );
}
