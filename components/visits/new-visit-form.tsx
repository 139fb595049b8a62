"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import type { z } from "zod";
import { ActionForm, listErrors, SubmitButton } from "@/components/forms/action-form";
import { AskAgain } from "@/components/forms/ask-again";
import { Select } from "@/components/forms/select";
import { TextArea, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { showMessage } from "@/components/ui/message-queue";
import { Segmented } from "@/components/ui/segmented";
import type { ActionResult } from "@/lib/doors/action-result";
import { visitPlan } from "@/lib/visits/schema";
import { Clash, clashOf } from "./clash";
import { PeopleChoice } from "./people-choice";
import { dayHelp, durationWords } from "./time-words";
import { type InstrumentChoice, WorkChoice } from "./work-choice";

type Plan = z.input<typeof visitPlan>;

const lengths = [30, 45, 60, 75, 90, 120, 150, 180, 240, 300, 360, 480, 600, 720];
const lengthOptions = lengths.map((minutes) => ({ value: String(minutes), label: durationWords(minutes) }));

export function NewVisitForm({
  visitId,
  site,
  instruments,
  technicians,
  chosen,
  ownId,
  locale,
  action,
}: {
  /** Made by the page, so that the form sent twice is one visit. */
  visitId: string;
  site: { id: string; name: string; timeZone: string };
  instruments: readonly InstrumentChoice[];
  technicians: readonly { id: string; name: string }[];
  chosen: {
    date: string;
    time: string;
    instrumentIds: readonly string[];
    /** As the instrument's service plan has it. */
    habit?: { technicianId: string | null; workMinutes: number; work: string } | undefined;
  };
  /** Set where this person may book own visits only. */
  ownId?: string | undefined;
  locale: string;
  action: (input: unknown) => Promise<ActionResult<{ id: string }>>;
}) {
  const router = useRouter();
  const { habit } = chosen;
  const expected = technicians.filter(({ id }) => technicians.length === 1 || id === habit?.technicianId);
  const state = useActionForm<Plan, { id: string }>({
    schema: visitPlan,
    action,
    defaultValues: {
      id: visitId,
      siteId: site.id,
      technicianIds: ownId ? [ownId] : expected.map(({ id }) => id),
      date: chosen.date,
      time: chosen.time,
      minutes: lengths.find((minutes) => minutes >= (habit?.workMinutes ?? 90)) ?? 90,
      jobs: chosen.instrumentIds.map((instrumentId) => ({ instrumentId, work: habit?.work ?? "Tuning" })),
      state: "offered",
      notes: "",
    },
    onSuccess: ({ id }) => {
      showMessage({ text: "The visit is booked." });
      router.push(`/visits/${id}` as Route);
    },
  });
  const { form } = state;
  const technicianIds = form.watch("technicianIds");
  const jobs = form.watch("jobs") ?? [];
  const agreed = form.watch("state") ?? "offered";
  const clash = clashOf(state.failure);
  // Errors of a list may stand at the list or at one of its entries.
  const errorIn = (name: "technicianIds" | "jobs") =>
    listErrors(form.formState.errors).find(({ path }) => path === name || path.startsWith(`${name}.`))
      ?.message;

  return (
    <ActionForm state={state} label="Book a visit" className="mt-5 max-w-160 gap-6!">
      <PeopleChoice
        people={technicians}
        chosen={technicianIds}
        fixedId={ownId}
        onChange={(ids) => form.setValue("technicianIds", ids, { shouldValidate: state.attempts > 0 })}
        error={errorIn("technicianIds")}
      />
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
        <TextInput
          label="Day"
          type="date"
          className="max-sm:col-span-2"
          help={dayHelp(form.watch("date"), locale)}
          {...state.field("date")}
        />
        <TextInput label="Starts" type="time" {...state.field("time")} />
        <Select label="Length" options={lengthOptions} {...state.numberField("minutes")} />
      </div>
      <AskAgain
        state={state}
        about={form.watch(["date", "time"]).join(" ")}
        question="Book it all the same"
        onYes={async () => {
          form.setValue("confirm", true);
          await state.submit();
          // Another time is another question.
          form.setValue("confirm", false);
        }}
      />
      {clash ? <Clash clash={clash} locale={locale} onTake={(time) => form.setValue("time", time)} /> : null}
      <WorkChoice
        instruments={instruments}
        jobs={jobs}
        onChange={(next) => form.setValue("jobs", next, { shouldValidate: state.attempts > 0 })}
        error={errorIn("jobs")}
      />
      <Segmented
        label="Has the customer agreed?"
        hideLabel={false}
        big
        options={[
          { value: "offered", label: "Not yet: offer it" },
          { value: "confirmed", label: "Agreed: confirmed" },
        ]}
        value={agreed}
        onChange={(next) => form.setValue("state", next)}
      />
      <TextArea
        label="Notes for us"
        optional
        help="The customer never sees these."
        rows={3}
        words
        {...state.field("notes")}
      />
      <div>
        <SubmitButton state={state} className="max-sm:h-13 max-sm:w-full">
          Book visit
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
