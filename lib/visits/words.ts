import type { VisitState } from "./rules";

/** The states as they are said to people. */
export const stateWords: Record<VisitState, string> = {
  offered: "offered",
  confirmed: "confirmed",
  "on-the-way": "on the way",
  "in-progress": "under way",
  done: "done",
  closed: "closed",
  declined: "declined",
  moved: "moved",
  cancelled: "cancelled",
  missed: "missed",
};
