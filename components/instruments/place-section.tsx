"use client";

import { useState } from "react";
import { PageSection } from "@/components/shell/page-section";
import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { Facts } from "@/components/ui/facts";
import { showDay } from "@/lib/dates";
import type { ActionResult } from "@/lib/doors/action-result";
import type { HoldingRecord, InstrumentRecord } from "@/lib/instruments/schema";
import { PlaceDialog } from "./place-dialog";

type Action = (input: unknown) => Promise<ActionResult<InstrumentRecord>>;

/** Where the instrument stands and whose it is; and where it stood before. */
export function PlaceSection({
  instrument,
  earlier,
  mayMove,
  newId,
  today,
  locale,
  move,
  correct,
}: {
  instrument: InstrumentRecord;
  earlier: readonly HoldingRecord[];
  mayMove: boolean;
  newId: string;
  today: string;
  locale: string;
  move: Action;
  correct: Action;
}) {
  const [open, setOpen] = useState<"move" | "correct" | null>(null);
  const { place } = instrument;
  return (
    <PageSection title="Place and owner">
      {place ? (
        <Facts
          facts={[
            {
              name: "Site",
              value: (
                <AppLink
                  className="link inline-flex items-center touch:min-h-11"
                  href={`/sites/${place.siteId}`}
                >
                  {place.siteName}
                </AppLink>
              ),
            },
            {
              name: "Owner",
              value: (
                <AppLink
                  className="link inline-flex items-center touch:min-h-11"
                  href={`/customers/${place.ownerId}`}
                >
                  {place.ownerName}
                </AppLink>
              ),
            },
            { name: "Who pays", value: place.payerName ?? "the owner" },
            { name: "Who books", value: place.bookingContactName ?? "the owner" },
            { name: "Since", value: showDay(place.since, locale) },
          ]}
        />
      ) : (
        <p className="text-ink-soft">It stands nowhere the shop knows of.</p>
      )}
      {mayMove ? (
        <div className="mt-3 flex flex-wrap gap-2">
          <Button onClick={() => setOpen("move")}>Moved or sold</Button>
          {place ? (
            <Button kind="quiet" onClick={() => setOpen("correct")}>
              Correct
            </Button>
          ) : null}
        </div>
      ) : null}
      {earlier.length > 0 ? (
        <>
          <h3 className="mt-5 mb-1 font-sans! text-14! font-semibold! tracking-normal!">Before that</h3>
          <ul className="border-t border-hairline">
            {earlier.map((holding) => (
              <li
                key={holding.id}
                className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 border-b border-hairline py-2"
              >
                <span className="min-w-0 break-words">
                  {holding.siteName}, {holding.ownerName}
                </span>
                <span className="lab">
                  {showDay(holding.since, locale)} – {holding.until ? showDay(holding.until, locale) : ""}
                </span>
              </li>
            ))}
          </ul>
        </>
      ) : null}
      {open ? (
        <PlaceDialog
          mode={open}
          instrument={instrument}
          newId={newId}
          today={today}
          action={open === "move" ? move : correct}
          onClose={() => setOpen(null)}
        />
      ) : null}
    </PageSection>
  );
}
