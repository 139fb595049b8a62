import type { ReactNode } from "react";
import { type KeptView, KeptViews } from "@/components/shell/kept-views";
import { NextAction, NextActionStrip } from "@/components/shell/next-action";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { DemoBadge } from "@/components/ui/demo-badge";
import { LoadingLines } from "@/components/ui/states";

/** The spread of a list: on the left what it is and the views of it, on the right the ledger. */
export function RecordsPage({
  title,
  subtitle,
  views,
  demo,
  tabs,
  add,
  children,
}: {
  title: string;
  subtitle: string;
  views: readonly KeptView[];
  demo: boolean;
  tabs?: ReactNode;
  /** The one primary action; null where the person may not. */
  add: { href: string; label: string } | null;
  children: ReactNode;
}) {
  return (
    <Spread
      left={
        <LeftPage title={title} subtitle={subtitle} aside={demo ? <DemoBadge /> : null} fold="Views">
          <KeptViews views={views} />
        </LeftPage>
      }
      right={
        <RightPage>
          {tabs}
          <WorkHead
            title={title}
            unseen
            actions={add ? <NextAction {...add} /> : null}
            // On the phone the action stands under the thumb, and the heading is unseen.
            className={add ? "max-lg:mt-3! max-lg:mb-0!" : undefined}
          />
          {children}
          {add ? <NextActionStrip {...add} /> : null}
        </RightPage>
      }
    />
  );
}

export function RecordsLoading({ title }: { title: string }) {
  return (
    <Spread
      left={<LeftPage title={title} fold={null} />}
      right={
        <RightPage>
          <LoadingLines
            label={`Loading: ${title.toLowerCase()}`}
            lines={12}
            row="h-9 phone:h-16"
            className="mt-24"
          />
        </RightPage>
      }
    />
  );
}
