"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { fetchJson } from "@/lib/client/fetch-json";
import { type PlanChoices, planKeys } from "@/lib/plans/keys";
import type { AnalysisRecord } from "@/lib/plans/schema";

/** The server's analysis of a sheet; the last one stays on screen while another choice is computed. */
export function useAnalysis(sheetId: string, choices: PlanChoices, initial?: AnalysisRecord) {
  return useQuery({
    queryKey: planKeys.analysis(sheetId, choices),
    queryFn: ({ signal }) =>
      fetchJson<AnalysisRecord>(`/api/v1/sheets/${sheetId}/analysis`, { query: choices, signal }),
    ...(initial ? { initialData: initial } : {}),
    placeholderData: keepPreviousData,
  });
}
