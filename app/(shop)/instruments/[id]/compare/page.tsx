import type { Metadata } from "next";
import { CompareView } from "@/components/plans/compare-view";
import { WorkHead } from "@/components/shell/spread";
import { EmptyState } from "@/components/ui/states";
import { AppError } from "@/lib/errors";
import { getInstrument } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { compareQuery } from "@/lib/plans/compare/schema";
import { compareSheets } from "@/lib/plans/compare/service";
import { sheetInHand } from "@/lib/plans/page-data";

export const metadata: Metadata = { title: "Compare" };

export default async function ComparePage({ params, searchParams }: PageProps<"/instruments/[id]/compare">) {
  const actor = await staffActor();
  const { id } = await params;
  const instrument = await getInstrument(actor, id);
  const { read, options, name } = await sheetInHand(actor, id, undefined);
  const asked = compareQuery.safeParse(await searchParams);
  const pair = asked.success ? asked.data.sheets : bestPair(read);
  if (!pair) {
    return (
      <>
        <WorkHead title="Compare" />
        <EmptyState title="Two sheets are needed">
          Read the same notes on two visits; then this page says which strings changed.
        </EmptyState>
      </>
    );
  }
  try {
    const comparison = await compareSheets(actor, id, pair);
    return (
      <CompareView
        key={pair.join()}
        comparison={comparison}
        instrument={instrument}
        sheets={options}
        names={{
          before: name({ ...comparison.before, id: comparison.before.sheetId }),
          after: name({ ...comparison.after, id: comparison.after.sheetId }),
        }}
      />
    );
  } catch (error) {
    if (!(error instanceof AppError) || (error.code !== "invalid" && error.code !== "not-found")) throw error;
    return (
      <>
        <WorkHead title="Compare" />
        <EmptyState title="These two cannot be compared">
          {Object.values(error.more.fields ?? {})[0] ?? error.message}
        </EmptyState>
      </>
    );
  }
}

/** The newest sheet, and the newest before it with as many notes: two sheets of one kind say most. */
function bestPair(read: readonly { id: string; notesRead: number }[]): [string, string] | null {
  const [newest, ...older] = read;
  if (!newest) return null;
  const other = older.find(({ notesRead }) => notesRead >= newest.notesRead) ?? older[0];
  return other ? [other.id, newest.id] : null;
}
