"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { planIn, servicePlanForm } from "@/lib/diary/service-plans/form";
import { removeServicePlan, saveServicePlan } from "@/lib/diary/service-plans/service";
import { defineAction } from "@/lib/doors/define-action";
import { correctPlace, moveInstrument } from "@/lib/instruments/holdings/service";
import {
  holdingChange,
  instrumentChange,
  newHolding,
  newInstrument,
  stringInput,
  stringsInput,
} from "@/lib/instruments/schema";
import { changeInstrument, createInstrument } from "@/lib/instruments/service";
import { removeString, saveString, saveStrings } from "@/lib/instruments/strings/service";
import { versionSeen } from "@/lib/version";

const showInstruments = () => revalidatePath("/instruments", "layout");

export const createInstrumentAction = defineAction({
  name: "instruments.create",
  permission: "instruments.create",
  input: newInstrument,
  run: async (actor, input) => {
    const record = await createInstrument(actor, input);
    showInstruments();
    return record;
  },
});

export const changeInstrumentAction = defineAction({
  name: "instruments.change",
  permission: "instruments.change",
  input: instrumentChange.omit({ archived: true, confirm: true }).extend({ id: z.uuid() }),
  run: async (actor, { id, ...change }) => {
    const record = await changeInstrument(actor, id, change);
    showInstruments();
    return record;
  },
});

export const archiveInstrumentAction = defineAction({
  name: "instruments.archive",
  permission: "instruments.place",
  input: instrumentChange
    .pick({ version: true, confirm: true })
    .extend({ id: z.uuid(), archived: z.boolean() }),
  run: async (actor, { id, ...change }) => {
    const record = await changeInstrument(actor, id, change);
    showInstruments();
    return record;
  },
});

export const moveInstrumentAction = defineAction({
  name: "instruments.move",
  permission: "instruments.place",
  input: newHolding.extend({ instrumentId: z.uuid() }),
  run: async (actor, { instrumentId, ...move }) => {
    const record = await moveInstrument(actor, instrumentId, move);
    showInstruments();
    return record;
  },
});

export const correctPlaceAction = defineAction({
  name: "instruments.correct-place",
  permission: "instruments.place",
  input: holdingChange.extend({ instrumentId: z.uuid() }),
  run: async (actor, { instrumentId, ...change }) => {
    const record = await correctPlace(actor, instrumentId, change);
    showInstruments();
    return record;
  },
});

const noteOf = z.object({ instrumentId: z.uuid(), midi: z.int().min(9).max(120) });

export const saveStringAction = defineAction({
  name: "instruments.save-string",
  permission: "instruments.change",
  input: noteOf.extend({ values: stringInput }),
  run: (actor, { instrumentId, midi, values }) => saveString(actor, instrumentId, midi, values),
});

export const saveStringsAction = defineAction({
  name: "instruments.save-strings",
  permission: "instruments.change",
  input: stringsInput.extend({ instrumentId: z.uuid() }),
  run: (actor, { instrumentId, rows }) => saveStrings(actor, instrumentId, { rows }),
});

export const removeStringAction = defineAction({
  name: "instruments.remove-string",
  permission: "instruments.change",
  input: noteOf.extend({ version: versionSeen.optional() }),
  run: async (actor, { instrumentId, midi, version }) => {
    await removeString(actor, instrumentId, midi, version);
    return { midi };
  },
});

export const saveServicePlanAction = defineAction({
  name: "service-plans.save",
  permission: "service-plans.change",
  input: servicePlanForm,
  run: async (actor, form) => {
    const plan = await saveServicePlan(actor, form.instrumentId, planIn(form));
    showInstruments();
    return plan;
  },
});

export const removeServicePlanAction = defineAction({
  name: "service-plans.remove",
  permission: "service-plans.change",
  input: z.object({ instrumentId: z.uuid(), version: versionSeen }),
  run: async (actor, { instrumentId, version }) => {
    await removeServicePlan(actor, instrumentId, version);
    showInstruments();
  },
});
