"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { differences, NewerVersion } from "@/components/records/newer-version";
import { showMessage } from "@/components/ui/message-queue";
import { keyName } from "@/lib/acoustics/keys";
import type { ActionResult } from "@/lib/doors/action-result";
import { instrumentKeys } from "@/lib/instruments/keys";
import { kindLabels } from "@/lib/instruments/rules";
import { type InstrumentRecord, instrumentForm } from "@/lib/instruments/schema";
import { InstrumentFields } from "./instrument-fields";
import { temperamentWords } from "./instrument-words";

const labels = {
  maker: "Maker",
  model: "Model",
  serial: "Serial number",
  year: "Year",
  kind: "Kind",
  room: "Room",
  keys: "Keys",
  breakMidi: "Break",
  referenceHz: "Pitch of A4",
  temperament: "Temperament",
  standingNote: "Standing note",
};

function valuesOf(record: InstrumentRecord) {
  return {
    id: record.id,
    version: record.version,
    maker: record.maker,
    model: record.model,
    serial: record.serial,
    year: record.year,
    kind: record.kind,
    room: record.room,
    firstMidi: record.firstMidi,
    lastMidi: record.lastMidi,
    breakMidi: record.breakMidi,
    referenceHz: record.referenceHz,
    temperament: record.temperament,
    standingNote: record.standingNote ?? "",
  };
}

type Values = Partial<ReturnType<typeof valuesOf>>;

/** The facts of an instrument, changed in place on its record. */
export function InstrumentForm({
  action,
  record,
}: {
  action: (input: unknown) => Promise<ActionResult<InstrumentRecord>>;
  record: InstrumentRecord;
}) {
  const router = useRouter();
  const client = useQueryClient();
  const state = useActionForm({
    schema: instrumentForm,
    action,
    defaultValues: valuesOf(record),
    onSuccess: async (saved: InstrumentRecord) => {
      await client.invalidateQueries({ queryKey: instrumentKeys.all });
      showMessage({ text: `${saved.name} is saved.` });
      router.refresh();
    },
  });
  const newer = state.failure?.code === "stale" ? (state.failure.current as InstrumentRecord) : null;
  return (
    <ActionForm state={state} label="Facts of the instrument" className="max-w-160">
      {newer ? (
        <NewerVersion
          what="instrument"
          differing={differences(labels, shown(valuesOf(newer)), shown(state.form.getValues() as Values))}
          onTakeSaved={() => state.form.reset(valuesOf(newer))}
          onKeepMine={() => {
            state.form.setValue("version", newer.version);
            void state.submit();
          }}
        />
      ) : null}
      <InstrumentFields state={state} />
      <div>
        <SubmitButton state={state} busyLabel="Saving">
          Save record
        </SubmitButton>
      </div>
    </ActionForm>
  );
}

function shown(values: Values): Record<keyof typeof labels, string> {
  const { firstMidi = 21, lastMidi = 108, breakMidi, temperament = "equal" } = values;
  return {
    maker: values.maker ?? "",
    model: values.model ?? "",
    serial: values.serial ?? "",
    year: values.year ? String(values.year) : "",
    kind: values.kind ? kindLabels[values.kind] : "",
    room: values.room ?? "",
    keys: `${keyName(firstMidi)} to ${keyName(lastMidi)}`,
    breakMidi: breakMidi ? `${keyName(breakMidi - 1)} | ${keyName(breakMidi)}` : "",
    referenceHz: `${values.referenceHz ?? ""} Hz`,
    temperament: Array.isArray(temperament) ? temperament.join(", ") : temperamentWords(temperament),
    standingNote: values.standingNote ?? "",
  };
}
