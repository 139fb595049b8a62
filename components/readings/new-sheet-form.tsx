"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useMemo } from "react";
import { v7 } from "uuid";
import { z } from "zod";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import type { ActionResult } from "@/lib/doors/action-result";
import { newSheet } from "@/lib/readings/schema";
import { isWallTime, withOffset } from "@/lib/wall-time";
import { SheetFields, type SheetJob, type SheetValues } from "./sheet-fields";

const form = newSheet.omit({ id: true }).extend({
  takenAt: z.string().refine(isWallTime, "Give the day and the time."),
});

type Props = {
  instrumentId: string;
  referenceHz: number;
  timeZone: string;
  /** Now, on the shop's clock. */
  now: string;
  jobs: readonly SheetJob[];
  jobId: string | null;
  stage: SheetValues["stage"];
  action: (input: unknown) => Promise<ActionResult<{ id: string }>>;
};

export function NewSheetForm(props: Props) {
  const { instrumentId, referenceHz, timeZone, now, jobs, jobId, stage, action } = props;
  const router = useRouter();
  // Made once, so that pressing twice, or again after silence, begins one sheet.
  const id = useMemo(() => v7(), []);
  const state = useActionForm<SheetValues, { id: string }>({
    schema: form,
    action: (input) => {
      const values = form.parse(input);
      return action({ ...values, instrumentId, id, takenAt: withOffset(values.takenAt, timeZone, 0) });
    },
    defaultValues: { referenceHz, takenAt: now, stage, jobId },
    onSuccess: (sheet) => router.push(`/instruments/${instrumentId}/sheets/${sheet.id}` as Route),
  });

  return (
    <ActionForm state={state} label="New reading sheet" className="max-w-120">
      <SheetFields
        state={state}
        jobs={jobs}
        referenceHelp="Cents on this sheet count from it. The instrument's own is filled in."
      />
      <div className="mt-1">
        <SubmitButton state={state} className="max-lg:h-13! max-lg:w-full max-lg:text-16">
          Begin sheet
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
