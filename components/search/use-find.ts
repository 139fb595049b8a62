"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { fetchJson } from "@/lib/client/fetch-json";
import { searchKeys } from "@/lib/search/keys";
import type { Found, SearchAnswer } from "@/lib/search/schema";

const pause = 120;

export type FoundGroup = { kind: Found["kind"]; title: string; items: Found[] };

const titles: Record<Found["kind"], string> = {
  instrument: "Instruments",
  customer: "Customers",
  site: "Sites",
};
const kindOrder = ["instrument", "customer", "site"] as const;

export function hrefOf({ kind, id }: Pick<Found, "kind" | "id">): string {
  return `/${kind}s/${id}`;
}

/** Grouped by kind; the kind that holds the best find comes first. */
export function groupFound(items: readonly Found[]): FoundGroup[] {
  const rank = (kind: Found["kind"]) => items.findIndex((item) => item.kind === kind);
  return kindOrder
    .filter((kind) => rank(kind) >= 0)
    .sort((one, other) => rank(one) - rank(other))
    .map((kind) => ({ kind, title: titles[kind], items: items.filter((item) => item.kind === kind) }));
}

/** Asks while one types, a little behind the typing; what was found stays until the next answer. */
export function useFind(typed: string) {
  const [asked, setAsked] = useState(typed.trim());
  useEffect(() => {
    const timer = setTimeout(() => setAsked(typed.trim()), pause);
    return () => clearTimeout(timer);
  }, [typed]);
  return {
    asked,
    ...useQuery({
      queryKey: searchKeys.find(asked),
      queryFn: ({ signal }) =>
        fetchJson<SearchAnswer>("/api/v1/search", { query: { q: asked, most: 20 }, signal }),
      enabled: asked !== "",
      placeholderData: asked === "" ? undefined : keepPreviousData,
      staleTime: 15_000,
    }),
  };
}
