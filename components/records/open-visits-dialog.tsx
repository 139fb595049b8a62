"use client";

import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { dayWithYear, hoursOf } from "@/components/visits/time-words";
import { VisitStateWord } from "@/components/visits/visit-state";
import type { OpenVisits } from "@/lib/visits/open/schema";

export type Archivable = { id: string; name: string; version: number; archivedAt: string | null };
export type Asked = { record: Archivable; open: OpenVisits };

/** Asked before records are archived whose visits are not over yet: which they are, and whether to go on. */
export function OpenVisitsDialog({
  asked,
  words,
  locale,
  busy,
  onKeep,
  onArchive,
}: {
  asked: readonly Asked[];
  words: readonly [string, string];
  locale: string;
  busy: boolean;
  onKeep: () => void;
  onArchive: () => void;
}) {
  const [first] = asked;
  const count = asked.reduce((sum, { open }) => sum + open.count, 0);
  const several = asked.length > 1;
  const what = several ? words[1] : words[0];
  return (
    <Dialog
      open={first !== undefined}
      onClose={onKeep}
      title={several ? `Archive these ${asked.length} ${what}?` : `Archive ${first?.record.name ?? ""}?`}
      actions={
        <>
          <Button data-safe="" onClick={onKeep}>
            Keep the {what}
          </Button>
          <Button kind="primary" busy={busy} busyLabel="Archiving" onClick={onArchive}>
            Archive all the same
          </Button>
        </>
      }
    >
      <p className="mt-2">
        {count === 1 ? "A visit is not over yet. It stands" : `${count} visits are not over yet. They stand`}{" "}
        when the {what} {several ? "are" : "is"} archived: cancel or move what should not.
      </p>
      {asked.map(({ record, open }) => (
        <section key={record.id} aria-label={record.name} className="mt-3">
          {several ? <h3 className="font-sans! text-14! font-semibold!">{record.name}</h3> : null}
          <ul className="border-t border-edge!">
            {open.visits.map((visit) => (
              <li key={visit.id}>
                <AppLink
                  href={`/visits/${visit.id}`}
                  className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-1.5 -outline-offset-2 hover:bg-cover"
                >
                  <span className="font-medium">
                    {dayWithYear(visit.start, locale)}, {hoursOf(visit, locale)}
                  </span>
                  <VisitStateWord state={visit.state} />
                  <span className="lab col-span-2 truncate">{visit.siteName}</span>
                </AppLink>
              </li>
            ))}
          </ul>
          {open.count > open.visits.length ? (
            <p className="lab mt-1">and {open.count - open.visits.length} more</p>
          ) : null}
        </section>
      ))}
    </Dialog>
  );
}
