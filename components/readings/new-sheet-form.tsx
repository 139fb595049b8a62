"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useMemo } from "react";
import { v7 } from "uuid";
import { z } from "zod";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Select } from "@/components/forms/select";
import { NumberInput, TextInput } from "@/components/forms/text-input";
import { emptyToUndefined, useActionForm } from "@/components/forms/use-action-form";
import { Segmented } from "@/components/ui/segmented";
import type { ActionResult } from "@/lib/doors/action-result";
import { newSheet, stages } from "@/lib/readings/schema";
import { isWallTime, withOffset } from "@/lib/wall-time";
import { stageTitle } from "./stage-title";

const form = newSheet.omit({ id: true }).extend({
  instrumentId: z.uuid(),
  takenAt: z.string().refine(isWallTime, "Give the day and the time."),
});
type Input = z.input<typeof form>;

type Props = {
  instrumentId: string;
  referenceHz: number;
  timeZone: string;
  /** Now, on the shop's clock. */
  now: string;
  jobs: ReadonlyArray<{ id: string; label: string }>;
  jobId: string | null;
  stage: Input["stage"];
  action: (input: unknown) => Promise<ActionResult<{ id: string }>>;
};

/** The circumstances of a sheet. Humidity and temperature are what later tells drift from weather. */
export function NewSheetForm({
  instrumentId,
  referenceHz,
  timeZone,
  now,
  jobs,
  jobId,
  stage,
  action,
}: Props) {
  const router = useRouter();
  // Made once, so that pressing twice, or again after silence, begins one sheet.
  const id = useMemo(() => v7(), []);
  const state = useActionForm<Input, { id: string }>({
    schema: form,
    action: (input) => {
      const values = form.parse(input);
      return action({ ...values, id, takenAt: withOffset(values.takenAt, timeZone, 0) });
    },
    defaultValues: { instrumentId, referenceHz, takenAt: now, stage, jobId },
    onSuccess: (sheet) => router.push(`/instruments/${instrumentId}/sheets/${sheet.id}` as Route),
  });
  const chosenStage = state.form.watch("stage");

  return (
    <ActionForm state={state} label="New reading sheet" className="max-w-120">
      <Segmented
        label="Stage"
        hideLabel={false}
        big
        options={stages.map((value) => ({ value, label: stageTitle(value) }))}
        value={chosenStage}
        onChange={(value) => state.form.setValue("stage", value, { shouldDirty: true })}
      />
      <TextInput label="Read on" type="datetime-local" {...state.field("takenAt")} />
      <NumberInput
        label="Reference pitch, A4"
        unit="Hz"
        help="Cents on this sheet count from it. The instrument's own is filled in."
        {...state.numberField("referenceHz")}
      />
      <div className="grid grid-cols-2 gap-4">
        <NumberInput label="Humidity" unit="%" optional {...state.numberField("humidityPercent")} />
        <NumberInput label="Temperature" unit="°C" optional {...state.numberField("temperatureC")} />
      </div>
      {jobs.length > 0 ? (
        <Select
          label="Visit"
          optional
          placeholder="None of these"
          options={jobs.map(({ id: value, label }) => ({ value, label }))}
          {...state.field("jobId", { setValueAs: emptyToUndefined })}
        />
      ) : null}
      <div className="mt-1">
        <SubmitButton state={state} className="max-lg:h-13! max-lg:w-full max-lg:text-16">
          Begin sheet
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
