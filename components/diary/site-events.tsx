"use client";

import { useId } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { PageSection } from "@/components/shell/page-section";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { type Day, showWeekday } from "@/lib/dates";
import { type SiteEventRecord, siteEventForm } from "@/lib/diary/events/schema";
import type { ActionResult } from "@/lib/doors/action-result";

/** Concerts and services for which the instruments of a site are to be ready. */
export function SiteEvents({
  siteId,
  events,
  today,
  locale,
  change,
}: {
  siteId: string;
  events: readonly SiteEventRecord[];
  today: Day;
  locale: string;
  /** The actions of those who may add and remove; absent for the rest. */
  change?: {
    add: (input: unknown) => Promise<ActionResult<SiteEventRecord>>;
    remove: (input: unknown) => Promise<ActionResult<unknown>>;
  };
}) {
  return (
    <PageSection title="Events" className="mt-10">
      {events.length === 0 ? (
        <p className="text-ink-soft">None to come. Instruments can be due before each.</p>
      ) : (
        <ul className="border-t border-edge">
          {events.map((event) => (
            <Line key={event.id} event={event} today={today} locale={locale} remove={change?.remove} />
          ))}
        </ul>
      )}
      {change ? <AddEvent key={events.length} siteId={siteId} add={change.add} /> : null}
    </PageSection>
  );
}

function Line({
  event,
  today,
  locale,
  remove,
}: {
  event: SiteEventRecord;
  today: Day;
  locale: string;
  remove: ((input: unknown) => Promise<ActionResult<unknown>>) | undefined;
}) {
  const name = useId();
  const year = event.day.slice(0, 4);
  async function removeIt() {
    const result = await remove?.({ siteId: event.siteId, id: event.id });
    if (result && !result.ok) showMessage({ kind: "attention", text: result.error.message });
  }
  return (
    <li className="flex min-h-11 items-center gap-3 border-b border-hairline">
      <span className="w-40 shrink-0">
        {showWeekday(event.day, locale, "short")}
        {year === today.slice(0, 4) ? null : ` ${year}`}
      </span>
      <span id={name} className="min-w-0 flex-1 break-words">
        {event.name}
      </span>
      {remove ? (
        <Button kind="quiet" size="small" onClick={removeIt} aria-describedby={name}>
          Remove
        </Button>
      ) : null}
    </li>
  );
}

function AddEvent({
  siteId,
  add,
}: {
  siteId: string;
  add: (input: unknown) => Promise<ActionResult<SiteEventRecord>>;
}) {
  const state = useActionForm({
    schema: siteEventForm,
    action: add,
    defaultValues: { siteId, day: "", name: "" },
  });
  return (
    <ActionForm state={state} label="Add an event" className="mt-4 max-w-160">
      <div className="grid items-start gap-x-6 gap-y-4 sm:grid-cols-[10rem_1fr_auto]">
        <TextInput label="Day" type="date" {...state.field("day")} />
        <TextInput label="Event" autoComplete="off" {...state.field("name")} />
        <SubmitButton state={state} busyLabel="Adding" kind="secondary" className="sm:mt-6">
          Add
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
