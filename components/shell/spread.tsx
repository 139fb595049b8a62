import type { ReactNode } from "react";
import { cx } from "../ui/class-names";
import { Crumb, type CrumbStep } from "./crumb";
import { Fold } from "./fold";

/** Two facing pages: the left says what this is, the right is where work happens. */
export function Spread({ left, right }: { left: ReactNode; right: ReactNode }) {
  return (
    <main className="lg:grid lg:min-h-dvh lg:grid-cols-[320px_minmax(0,1fr)] xl:grid-cols-[392px_minmax(0,1fr)] 2xl:grid-cols-[392px_minmax(0,1168px)] print:block">
      {left}
      {right}
    </main>
  );
}

export type LeftPageProps = {
  crumb?: readonly CrumbStep[];
  title: ReactNode;
  /** One line under the title. */
  subtitle?: ReactNode;
  /** A badge or state at the title's end. */
  aside?: ReactNode;
  children?: ReactNode;
  /**
   * Below the desk's width the rest of this page folds away behind a button of this name.
   * `null` keeps it open: for pages whose left side is the work, such as the day's visits.
   */
  fold?: string | null;
};

export function LeftPage({ crumb, title, subtitle, aside, children, fold = "About" }: LeftPageProps) {
  const rest = children ? <div className="grid gap-8 max-lg:gap-6">{children}</div> : null;
  return (
    <section
      aria-label="What this is"
      className="relative z-10 bg-paper px-4 py-4 sm:max-lg:px-6 lg:border-r lg:border-hairline lg:pt-8 lg:pr-7 lg:pb-6 lg:pl-8 max-lg:border-b max-lg:border-hairline print:border-0 print:p-0"
    >
      <SewingHoles />
      {crumb ? <Crumb steps={crumb} /> : null}
      {fold !== null && rest ? (
        <Fold label={fold} head={<PageTitle title={title} subtitle={subtitle} aside={aside} />}>
          {rest}
        </Fold>
      ) : (
        <>
          <PageTitle title={title} subtitle={subtitle} aside={aside} />
          {rest ? <div className="mt-5 lg:mt-5">{rest}</div> : null}
        </>
      )}
    </section>
  );
}

function PageTitle({
  title,
  subtitle,
  aside,
}: {
  title: ReactNode;
  subtitle?: ReactNode;
  aside?: ReactNode;
}) {
  return (
    <header className="min-w-0">
      <div className="flex items-start justify-between gap-3">
        <h1 className="min-w-0 break-words">{title}</h1>
        {aside ? <span className="mt-2 shrink-0">{aside}</span> : null}
      </div>
      {subtitle ? <p className="mt-1 text-ink-soft max-lg:text-16">{subtitle}</p> : null}
    </header>
  );
}

/** Three holes where the pages are sewn, at the middle of the window however long the page is. */
function SewingHoles() {
  return (
    <span aria-hidden="true" className="absolute inset-y-0 right-[-2.5px] hidden w-1 lg:block print:hidden">
      <span className="sticky top-[50vh] block size-1 rounded-full bg-edge shadow-[0_-28px_0_var(--edge),0_28px_0_var(--edge)]" />
    </span>
  );
}

export function RightPage({ children, className }: { children: ReactNode; className?: string }) {
  return (
    <section
      id="work"
      aria-label="Work"
      tabIndex={-1}
      className={cx(
        "min-w-0 scroll-mt-0 bg-sheet px-4 pt-2 pb-6 outline-none sm:max-lg:px-6 lg:px-10 lg:pt-5 2xl:border-r 2xl:border-hairline print:p-0",
        className,
      )}
    >
      {children}
    </section>
  );
}

/** The right page's own heading: what is on it, one line about it, its actions at the end. */
export function WorkHead({
  title,
  summary,
  actions,
  unseen = false,
  className,
}: {
  title: ReactNode;
  summary?: ReactNode;
  actions?: ReactNode;
  /** Where the left page's title says it already: the heading is for screen readers. */
  unseen?: boolean;
  className?: string;
}) {
  return (
    <div
      className={cx(
        "flex items-center justify-between gap-x-4 gap-y-3 max-lg:flex-wrap",
        unseen && !actions ? "mt-2" : "mt-3.5 mb-3",
        className,
      )}
    >
      <div className="min-w-0">
        <h2 className={unseen ? "sr-only" : undefined}>{title}</h2>
        {summary ? <p className="lab mt-1">{summary}</p> : null}
      </div>
      {actions ? (
        <div className="flex flex-wrap items-center gap-2 lg:shrink-0" data-no-print>
          {actions}
        </div>
      ) : null}
    </div>
  );
}
