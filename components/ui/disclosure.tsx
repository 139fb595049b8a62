import type { ReactNode } from "react";
import { cx } from "./class-names";
import { Sign } from "./sign";

/** A part that opens in place. The browser's own details element, so it works before any script. */
export function Disclosure({
  label,
  open,
  children,
  className,
}: {
  label: ReactNode;
  open?: boolean;
  children: ReactNode;
  className?: string;
}) {
  return (
    <details open={open} className={cx("group", className)}>
      <summary className="flex min-h-9 list-none items-center gap-2 rounded font-medium text-iron touch:min-h-11 [&::-webkit-details-marker]:hidden">
        <Sign name="chevron-right" className="group-open:rotate-90" />
        {label}
      </summary>
      <div className="pt-2 pb-4">{children}</div>
    </details>
  );
}
