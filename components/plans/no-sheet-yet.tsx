import { WorkHead } from "@/components/shell/spread";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";

export function NoSheetYet({ instrumentId, canBegin }: { instrumentId: string; canBegin: boolean }) {
  return (
    <>
      <WorkHead title="Inharmonicity and stretch" />
      <EmptyState
        title="No readings yet"
        action={
          canBegin ? (
            <LinkButton kind="primary" href={`/instruments/${instrumentId}/sheets/new`}>
              New reading sheet
            </LinkButton>
          ) : undefined
        }
      >
        {canBegin
          ? "The sheet names the note that tells most, one after another. Three partials of a note are enough for a first B."
          : "A technician reads the first notes; then the curve of all keys stands here."}
      </EmptyState>
    </>
  );
}
