"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/doors/define-action";
import { planVisit } from "@/lib/visits/booking/service";
import { moveVisit, transitionVisit } from "@/lib/visits/moves/service";
import { visitChange, visitMove, visitPlan, visitTransition } from "@/lib/visits/schema";
import { changeVisit } from "@/lib/visits/service";

const ofVisit = { id: z.uuid() };

/** Every page of the book may show a visit. */
function showChanged() {
  revalidatePath("/", "layout");
}

export const bookVisitAction = defineAction({
  name: "visits.book",
  permission: "visits.change",
  input: visitPlan,
  run: async (actor, plan) => {
    const { id } = await planVisit(actor, plan);
    showChanged();
    return { id };
  },
});

export const stepVisitAction = defineAction({
  name: "visits.step",
  permission: "visits.change",
  input: visitTransition.extend(ofVisit),
  run: async (actor, { id, ...step }) => {
    const { version, moves, movedToId } = await transitionVisit(actor, id, step);
    showChanged();
    return { version, moves, movedToId };
  },
});

export const moveVisitAction = defineAction({
  name: "visits.move",
  permission: "visits.change",
  input: visitMove,
  run: async (actor, { id, ...plan }) => {
    const { version, moves, movedToId } = await moveVisit(actor, id, plan);
    showChanged();
    return { version, moves, movedToId };
  },
});

export const changeVisitAction = defineAction({
  name: "visits.change",
  permission: "visits.change",
  input: visitChange.extend(ofVisit),
  run: async (actor, { id, ...change }) => {
    await changeVisit(actor, id, change);
    showChanged();
    return { id };
  },
});
