import type { ReactNode } from "react";
import { cx } from "../ui/class-names";

/**
 * A headed part of the left page, or a smaller one of the right page. A second-level heading to screen
 * readers, because on the left page it follows the title directly; one size smaller to the eye.
 */
export function PageSection({
  title,
  aside,
  children,
  className,
}: {
  title: ReactNode;
  /** A count or a link at the end of the heading's line. */
  aside?: ReactNode;
  children: ReactNode;
  className?: string;
}) {
  return (
    <section className={cx("min-w-0", className)}>
      <div className="mb-2 flex items-baseline justify-between gap-3">
        <h2 className="text-19! leading-6! tracking-[-0.005em]!">{title}</h2>
        {aside ? <span className="lab">{aside}</span> : null}
      </div>
      {children}
    </section>
  );
}
