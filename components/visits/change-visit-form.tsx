"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { z } from "zod";
import { ActionForm, listErrors, SubmitButton } from "@/components/forms/action-form";
import { TextArea } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { LinkButton } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { type VisitRecord, visitChange } from "@/lib/visits/schema";
import { Clash, clashOf } from "./clash";
import { PeopleChoice } from "./people-choice";
import { type InstrumentChoice, WorkChoice } from "./work-choice";

const schema = visitChange.omit({ start: true, end: true }).extend({ id: z.uuid() });

type Change = z.input<typeof schema>;

/** Puts right who comes, what is done and the notes. The time changes by moving the visit. */
export function ChangeVisitForm({
  visit,
  instruments,
  technicians,
  ownId,
  locale,
  action,
}: {
  visit: Pick<VisitRecord, "id" | "version" | "technicians" | "jobs" | "notes">;
  instruments: readonly InstrumentChoice[];
  technicians: readonly { id: string; name: string }[];
  ownId?: string | undefined;
  locale: string;
  action: (input: unknown) => Promise<ActionResult<{ id: string }>>;
}) {
  const router = useRouter();
  const href = `/visits/${visit.id}`;
  const state = useActionForm<Change, { id: string }>({
    schema,
    action,
    defaultValues: {
      id: visit.id,
      version: visit.version,
      technicianIds: visit.technicians.map(({ id }) => id),
      jobs: visit.jobs.map(({ instrumentId, work }) => ({ instrumentId, work })),
      notes: visit.notes ?? "",
    },
    onSuccess: () => {
      showMessage({ text: "The visit is changed." });
      router.push(href as Route);
    },
  });
  const { form } = state;
  const technicianIds = form.watch("technicianIds") ?? [];
  const jobs = form.watch("jobs") ?? [];
  const clash = clashOf(state.failure);
  const errorIn = (name: "technicianIds" | "jobs") =>
    listErrors(form.formState.errors).find(({ path }) => path === name || path.startsWith(`${name}.`))
      ?.message;

  return (
    <ActionForm state={state} label="Change the visit" className="mt-5 max-w-160 gap-6!">
      <PeopleChoice
        people={technicians}
        chosen={technicianIds}
        fixedId={ownId}
        onChange={(ids) => form.setValue("technicianIds", ids, { shouldValidate: state.attempts > 0 })}
        error={errorIn("technicianIds")}
      />
      {clash ? <Clash clash={clash} locale={locale} /> : null}
      <WorkChoice
        instruments={instruments}
        jobs={jobs}
        onChange={(next) => form.setValue("jobs", next, { shouldValidate: state.attempts > 0 })}
        error={errorIn("jobs")}
      />
      <TextArea
        label="Notes for us"
        optional
        help="The customer never sees these."
        rows={3}
        words
        {...state.field("notes")}
      />
      <div className="flex flex-wrap gap-2">
        <SubmitButton state={state}>Save visit</SubmitButton>
        <LinkButton href={href}>Leave as it was</LinkButton>
      </div>
    </ActionForm>
  );
}
