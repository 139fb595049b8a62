"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useRef } from "react";
import { v7 } from "uuid";
import { showMessage } from "@/components/ui/message-queue";
import { fetchJson } from "@/lib/client/fetch-json";
import { type PlanChoices, planKeys } from "@/lib/plans/keys";
import type { PlanRecord } from "@/lib/plans/schema";

function temperamentOf(value: string | undefined): string | number[] | undefined {
  return value?.includes(",") ? value.split(",").map(Number) : value;
}

/** Keeps the plan. The id is made here, so a repeated try after a lost answer is the same plan. */
export function useSavePlan(sheetId: string, jobId: string | null) {
  const client = useQueryClient();
  const id = useRef(v7());
  return useMutation({
    mutationFn: ({ temperament, ...choices }: PlanChoices) =>
      fetchJson<PlanRecord>(`/api/v1/sheets/${sheetId}/plans`, {
        body: { ...choices, temperament: temperamentOf(temperament), id: id.current, jobId },
      }),
    onSuccess: async () => {
      id.current = v7();
      showMessage({ kind: "done", text: jobId ? "Saved as the visit's plan." : "Plan saved." });
      await client.invalidateQueries({ queryKey: planKeys.plans(sheetId) });
    },
    onError: (error) =>
      showMessage({ kind: "attention", text: "The plan was not saved.", detail: error.message }),
  });
}
