import { addDays, type Day, isDay } from "@/lib/dates";

/** Which stretch of days the ledger shows; as the address says it. Without a word: what is to come. */
export const spans = ["coming", "past", "all"] as const;
export type SpanName = (typeof spans)[number];

export type Span = {
  name: SpanName | "days";
  from: Day | undefined;
  to: Day | undefined;
  latestFirst: boolean;
};

export function readSpan(params: { get(name: string): string | null }, today: Day): Span {
  const from = dayIn(params.get("from"));
  const to = dayIn(params.get("to"));
  if (from || to) return { name: "days", from, to, latestFirst: false };
  const name = spans.find((one) => one === params.get("when")) ?? "coming";
  if (name === "past") return { name, from: undefined, to: addDays(today, -1), latestFirst: true };
  if (name === "all") return { name, from: undefined, to: undefined, latestFirst: true };
  return { name, from: today, to: undefined, latestFirst: false };
}

function dayIn(text: string | null): Day | undefined {
  return text && isDay(text) ? text : undefined;
}
