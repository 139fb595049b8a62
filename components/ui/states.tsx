import type { ReactNode } from "react";
import { cx } from "./class-names";
import { StateWord } from "./state-word";

type StateProps = { title: string; children?: ReactNode; action?: ReactNode; className?: string };

/** Nothing here yet: says what to do first. */
export function EmptyState({ title, children, action, className }: StateProps) {
  return (
    <div className={cx("py-4", className)}>
      <p className="font-semibold">{title}</p>
      {children ? <div className="mt-0.5 max-w-120 text-ink-soft">{children}</div> : null}
      {action ? <div className="mt-3">{action}</div> : null}
    </div>
  );
}

/** Something failed: says what, what is safe, and offers to try again. */
export function ErrorState({
  title,
  children,
  action,
  reference,
  className,
}: StateProps & {
  /** What to tell support, so that they find it in the log. */
  reference?: string;
}) {
  return (
    <div role="alert" className={cx("py-4", className)}>
      <StateWord kind="attention" wrap className="font-semibold!">
        {title}
      </StateWord>
      {children || reference ? (
        <div className="mt-0.5 max-w-120 text-ink-soft">
          {children}
          {reference ? ` Note ${reference} for support.` : null}
        </div>
      ) : null}
      {action ? <div className="mt-3">{action}</div> : null}
    </div>
  );
}

/** No network: says what is still here and what waits. */
export function OfflineState({ title = "No network", children, action, className }: Partial<StateProps>) {
  return (
    <div role="status" className={cx("py-4", className)}>
      <StateWord kind="phone-waiting" wrap className="font-semibold!">
        {title}
      </StateWord>
      {children ? <div className="mt-0.5 max-w-120 text-ink-soft">{children}</div> : null}
      {action ? <div className="mt-3">{action}</div> : null}
    </div>
  );
}

const widths = ["w-5/6", "w-3/5", "w-3/4", "w-2/5", "w-2/3", "w-1/2"];

/** Quiet lines where the words will be. Still, because what moves while nothing happens is a lie. */
export function LoadingLines({
  label,
  lines = 4,
  row,
  className,
}: {
  label: string;
  lines?: number;
  /** Height class of one line, so that the page does not jump: "h-9" for ledger rows. */
  row?: string;
  className?: string;
}) {
  return (
    <div role="status" className={className}>
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, index) => (
        <div
          key={index}
          aria-hidden="true"
          className={cx("flex items-center", row ?? "h-5", row && "border-b border-hairline")}
        >
          <span className={cx("block h-2.5 bg-cover", widths[index % widths.length])} />
        </div>
      ))}
    </div>
  );
}
