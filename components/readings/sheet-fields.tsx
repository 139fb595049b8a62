"use client";

import { Select } from "@/components/forms/select";
import { NumberInput, TextArea, TextInput } from "@/components/forms/text-input";
import { emptyToUndefined, type useActionForm } from "@/components/forms/use-action-form";
import { Segmented } from "@/components/ui/segmented";
import { type Stage, stages } from "@/lib/readings/schema";
import { stageTitle } from "./stage-title";

export type SheetJob = { id: string; label: string };

/** What every form about a sheet's circumstances holds; `takenAt` is wall time on the shop's clock. */
export type SheetValues = {
  stage: Stage;
  takenAt: string;
  referenceHz: number;
  humidityPercent?: number | null | undefined;
  temperatureC?: number | null | undefined;
  jobId?: string | null | undefined;
  remarks?: string | null | undefined;
  /** Of a sheet that is there already. */
  version?: number | undefined;
  readingsKeep?: "hz" | "cents" | undefined;
};

type Form = ReturnType<typeof useActionForm<SheetValues, unknown>>;

/** The circumstances of a sheet. Humidity and temperature are what later tells drift from weather. */
export function SheetFields({
  state,
  jobs,
  referenceHelp,
  afterReference,
}: {
  state: Pick<Form, "form" | "field" | "numberField">;
  jobs: readonly SheetJob[];
  referenceHelp: string;
  afterReference?: React.ReactNode;
}) {
  const stage = state.form.watch("stage");
  return (
    <>
      <Segmented
        label="Stage"
        hideLabel={false}
        big
        options={stages.map((value) => ({ value, label: stageTitle(value) }))}
        value={stage}
        onChange={(value) => state.form.setValue("stage", value, { shouldDirty: true })}
      />
      <TextInput label="Read on" type="datetime-local" {...state.field("takenAt")} />
      <NumberInput
        label="Reference pitch, A4"
        unit="Hz"
        help={referenceHelp}
        {...state.numberField("referenceHz")}
      />
      {afterReference}
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
      <TextArea
        label="Remarks"
        optional
        help="What a later reader should know: a window open, a string muted, lid off."
        rows={3}
        words
        {...state.field("remarks")}
      />
    </>
  );
}
