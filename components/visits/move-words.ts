import type { Move, VisitState } from "@/lib/visits/rules";
import { stateWords } from "@/lib/visits/words";

const onward: Record<VisitState, string> = {
  offered: "Offer again",
  confirmed: "Confirm",
  "on-the-way": "Set off",
  "in-progress": "Begin work",
  done: "Finish work",
  closed: "Close visit",
  declined: "Customer declined",
  moved: "Move to another time",
  cancelled: "Cancel visit",
  missed: "Nobody was there",
};

const happened: Record<VisitState, string> = {
  offered: "The visit is offered.",
  confirmed: "The visit is confirmed.",
  "on-the-way": "On the way.",
  "in-progress": "Work has begun.",
  done: "The work is done.",
  closed: "The visit is closed.",
  declined: "The visit is declined.",
  moved: "The visit is moved.",
  cancelled: "The visit is cancelled.",
  missed: "The visit is missed.",
};

export function moveLabel(move: Move): string {
  return move.back ? `Back to “${stateWords[move.to]}”` : onward[move.to];
}

export function moveDone(to: VisitState): string {
  return happened[to];
}

/** The step a technician takes next: the first of the life cycle that needs no explaining. */
export function nextMove(moves: readonly Move[]): Move | undefined {
  return moves.find((move) => !move.asksReason && !move.back);
}
