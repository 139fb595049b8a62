"use client";

import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { showTime } from "@/lib/dates";
import { type Overlap, overlap } from "@/lib/visits/schema";
import { dayWithYear, hoursOf } from "./time-words";

/** What a refused booking carries, where it was refused because somebody is taken. */
export function clashOf(failure: { code: string; current?: unknown } | null): Overlap | null {
  if (failure?.code !== "visit-overlap") return null;
  const read = overlap.safeParse(failure.current);
  return read.success ? read.data : null;
}

/** The visit in the way, and the nearest free times of that day to take instead. */
export function Clash({
  clash,
  locale,
  onTake,
}: {
  clash: Overlap;
  locale: string;
  /** Where another time can be taken from here. */
  onTake?: (time: string) => void;
}) {
  return (
    <div className="border-l-3 border-edge! py-1 pl-4">
      <p>
        In the way:{" "}
        <AppLink href={`/visits/${clash.visitId}`} className="link">
          {clash.siteName}
        </AppLink>
        , {dayWithYear(clash.start, locale)}, {hoursOf(clash, locale)}.
      </p>
      {onTake && clash.free.length > 0 ? (
        <div className="mt-2 flex flex-wrap items-center gap-2">
          <span>Free that day:</span>
          {clash.free.map((time) => (
            <Button key={time} size="small" onClick={() => onTake(time)}>
              {showTime(`2000-01-01T${time}`, locale)}
              <span className="sr-only"> instead</span>
            </Button>
          ))}
        </div>
      ) : null}
      {onTake && clash.free.length === 0 ? (
        <p className="mt-1">
          No time of this length is free between 8:00 and 19:00 that day. Choose another day.
        </p>
      ) : null}
    </div>
  );
}
