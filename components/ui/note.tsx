import type { ReactNode } from "react";
import { cx } from "./class-names";

/** People's own words, in the italic that nothing else uses. `by` says who said them. */
export function Note({
  children,
  by,
  quoted = false,
  className,
}: {
  children: ReactNode;
  by?: ReactNode;
  quoted?: boolean;
  className?: string;
}) {
  return (
    <figure className={cx("min-w-0", className)}>
      <blockquote className="note break-words whitespace-pre-line">
        {quoted ? "“" : null}
        {children}
        {quoted ? "”" : null}
      </blockquote>
      {by ? <figcaption className="lab mt-1">{by}</figcaption> : null}
    </figure>
  );
}
