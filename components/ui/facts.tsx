import { Fragment, type ReactNode } from "react";
import { cx } from "./class-names";

export type Fact = { name: string; value: ReactNode };

/** Names and values. "rows" gives every fact its own ruled line, for documents and customer pages. */
export function Facts({
  facts,
  look = "plain",
  className,
}: {
  facts: ReadonlyArray<Fact | null | false | undefined>;
  look?: "plain" | "rows" | "sums";
  className?: string;
}) {
  const shown = facts.filter((fact): fact is Fact => Boolean(fact));
  if (look === "rows") {
    return (
      <dl className={cx("text-16", className)}>
        {shown.map((fact) => (
          <div
            key={fact.name}
            className="flex min-h-11 items-center justify-between gap-4 border-b border-hairline py-2"
          >
            <dt className="shrink-0 text-ink-soft">{fact.name}</dt>
            <dd className="min-w-0 text-right break-words">{fact.value}</dd>
          </div>
        ))}
      </dl>
    );
  }
  return (
    <dl
      className={cx(
        "grid gap-y-1",
        look === "sums"
          ? "grid-cols-[1fr_auto]"
          : "grid-cols-[96px_minmax(0,1fr)] xl:grid-cols-[112px_minmax(0,1fr)]",
        className,
      )}
    >
      {shown.map((fact) => (
        <Fragment key={fact.name}>
          <dt className="text-ink-soft">{fact.name}</dt>
          <dd className={cx("min-w-0 break-words", look === "sums" && "text-right")}>{fact.value}</dd>
        </Fragment>
      ))}
    </dl>
  );
}
