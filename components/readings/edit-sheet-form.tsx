"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { z } from "zod";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { differences, NewerVersion } from "@/components/records/newer-version";
import { LinkButton } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { Segmented } from "@/components/ui/segmented";
import type { ActionResult } from "@/lib/doors/action-result";
import { newSheet, type SheetRow, sheetChange, sheetRow } from "@/lib/readings/schema";
import { isWallTime, wallTimeOf, withOffset } from "@/lib/wall-time";
import { SheetFields, type SheetJob, type SheetValues } from "./sheet-fields";
import { stageTitle } from "./stage-title";

const form = newSheet.omit({ id: true }).extend({
  takenAt: z.string().refine(isWallTime, "Give the day and the time."),
  remarks: sheetChange.shape.remarks,
  readingsKeep: sheetChange.shape.readingsKeep,
  version: sheetChange.shape.version,
});

const labels = {
  stage: "Stage",
  takenAt: "Read on",
  referenceHz: "Reference pitch, A4",
  humidityPercent: "Humidity",
  temperatureC: "Temperature",
  jobId: "Visit",
  remarks: "Remarks",
};

type Props = {
  sheet: SheetRow;
  timeZone: string;
  jobs: readonly SheetJob[];
  action: (input: unknown) => Promise<ActionResult<unknown>>;
};

/** The circumstances of a sheet, put right afterwards. */
export function EditSheetForm({ sheet, timeZone, jobs, action }: Props) {
  const router = useRouter();
  const at = `/instruments/${sheet.instrumentId}/sheets/${sheet.id}`;
  const state = useActionForm<SheetValues, unknown>({
    schema: form,
    action: (input) => {
      const values = form.parse(input);
      return action({
        ...values,
        id: sheet.id,
        takenAt: withOffset(values.takenAt, timeZone, 0),
        // An emptied field takes away what was there.
        humidityPercent: values.humidityPercent ?? null,
        temperatureC: values.temperatureC ?? null,
        jobId: values.jobId ?? null,
        remarks: values.remarks?.trim() || null,
      });
    },
    defaultValues: valuesOf(sheet, timeZone),
    onSuccess: () => {
      showMessage({ text: "The sheet is changed." });
      router.push(at as Route);
    },
  });
  const { form: fields, failure } = state;
  const newer = failure?.code === "stale" ? sheetRow.safeParse(failure.current) : null;
  const words = (values: Partial<SheetValues>) => shown(values, jobs);
  const moved = Number(fields.watch("referenceHz")) !== sheet.referenceHz && sheet.notesRead > 0;

  return (
    <ActionForm state={state} label="Circumstances of the sheet" className="max-w-120">
      {newer?.success ? (
        <NewerVersion
          what="sheet"
          differing={differences(labels, words(valuesOf(newer.data, timeZone)), words(fields.getValues()))}
          onTakeSaved={() => fields.reset(valuesOf(newer.data, timeZone))}
          onKeepMine={() => {
            fields.setValue("version", newer.data.version);
            void state.submit();
          }}
        />
      ) : null}
      <SheetFields
        state={state}
        jobs={jobs}
        referenceHelp="Cents on this sheet count from it."
        afterReference={
          moved ? (
            <div>
              <Segmented
                label="What was read keeps its"
                hideLabel={false}
                options={[
                  { value: "hz", label: "Frequencies" },
                  { value: "cents", label: "Cents" },
                ]}
                value={fields.watch("readingsKeep") ?? "hz"}
                onChange={(value) => fields.setValue("readingsKeep", value, { shouldDirty: true })}
              />
              <p className="lab mt-1">
                {fields.watch("readingsKeep") === "cents"
                  ? "The readings were typed in cents from the new pitch: their frequencies move with it and every note is fitted again."
                  : "The frequencies stay as they were read; the cents shown change."}
              </p>
            </div>
          ) : null
        }
      />
      <div className="mt-1 flex flex-wrap gap-2">
        <SubmitButton state={state} busyLabel="Saving">
          Save sheet
        </SubmitButton>
        <LinkButton href={at}>Leave as it was</LinkButton>
      </div>
    </ActionForm>
  );
}

function valuesOf(sheet: SheetRow, timeZone: string): SheetValues {
  const { version, stage, referenceHz, humidityPercent, temperatureC, jobId, remarks } = sheet;
  return {
    version,
    stage,
    takenAt: wallTimeOf(new Date(sheet.takenAt), timeZone),
    referenceHz,
    humidityPercent,
    temperatureC,
    jobId,
    remarks: remarks ?? "",
  };
}

function shown(values: Partial<SheetValues>, jobs: readonly SheetJob[]): Record<keyof typeof labels, string> {
  const number = (value: unknown, unit: string) =>
    value === null || value === undefined ? "" : `${value} ${unit}`;
  return {
    stage: values.stage ? stageTitle(values.stage) : "",
    takenAt: values.takenAt?.replace("T", ", ") ?? "",
    referenceHz: number(values.referenceHz, "Hz"),
    humidityPercent: number(values.humidityPercent, "%"),
    temperatureC: number(values.temperatureC, "°C"),
    jobId: values.jobId ? (jobs.find(({ id }) => id === values.jobId)?.label ?? "Another visit") : "",
    remarks: values.remarks ?? "",
  };
}
