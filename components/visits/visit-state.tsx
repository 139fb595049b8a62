import { type StateKind, StateWord } from "@/components/ui/state-word";
import type { VisitState } from "@/lib/visits/rules";
import { stateWords } from "@/lib/visits/words";

const kinds: Record<VisitState, StateKind> = {
  offered: "draft",
  confirmed: "done",
  "on-the-way": "sent",
  "in-progress": "partial",
  done: "done",
  closed: "done",
  declined: "stopped",
  moved: "sent",
  cancelled: "stopped",
  missed: "attention",
};

export function VisitStateWord({ state, className }: { state: VisitState; className?: string }) {
  return (
    <StateWord kind={kinds[state]} className={className}>
      {stateWords[state]}
    </StateWord>
  );
}
