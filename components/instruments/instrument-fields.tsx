"use client";

import type { FieldErrors, UseFormReturn } from "react-hook-form";
import { Select } from "@/components/forms/select";
import { NumberInput, TextArea, TextInput } from "@/components/forms/text-input";
import { kindLabels, kinds } from "@/lib/instruments/rules";
import { type Keys, KeysFields } from "./keys-fields";
import { TemperamentField } from "./temperament-field";

const kindOptions = kinds.map((kind) => ({ value: kind, label: kindLabels[kind] }));

export type InstrumentValues = Keys & {
  maker: string;
  model: string;
  serial: string;
  year: number | null;
  kind: (typeof kinds)[number] | "";
  room: string;
  referenceHz: number;
  temperament: string | number[];
  standingNote: string;
};

type Registered = { error?: string };

/** What the fields need of the form: the same for a new instrument and an old one. */
export type FormOfInstrument = {
  field: (name: keyof InstrumentValues) => Registered;
  numberField: (name: keyof InstrumentValues) => Registered;
  // biome-ignore lint/suspicious/noExplicitAny: the fields serve two forms whose values differ elsewhere
  form: UseFormReturn<any, any, any>;
};

export function InstrumentFields({ state }: { state: FormOfInstrument }) {
  const { form } = state;
  const errors = form.formState.errors;
  const keys: Keys = {
    firstMidi: form.watch("firstMidi"),
    lastMidi: form.watch("lastMidi"),
    breakMidi: form.watch("breakMidi"),
  };
  function changeKeys(change: Partial<Keys>) {
    for (const [name, value] of Object.entries(change)) form.setValue(name, value, { shouldDirty: true });
    form.clearErrors(["firstMidi", "lastMidi", "breakMidi"]);
  }
  return (
    <>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <TextInput label="Maker" autoComplete="off" {...state.field("maker")} />
        <TextInput label="Model" optional autoComplete="off" {...state.field("model")} />
        <TextInput label="Serial number" optional autoComplete="off" {...state.field("serial")} />
        <NumberInput label="Year" optional whole maxLength={4} {...state.numberField("year")} />
        <Select label="Kind" options={kindOptions} placeholder="Choose" {...state.field("kind")} />
        <TextInput
          label="Room"
          optional
          help="Where within the site: “Room 12”, “stage left”."
          autoComplete="off"
          {...state.field("room")}
        />
        <KeysFields
          value={keys}
          onChange={changeKeys}
          errors={{
            firstMidi: messageOf(errors, "firstMidi"),
            lastMidi: messageOf(errors, "lastMidi"),
            breakMidi: messageOf(errors, "breakMidi"),
          }}
        />
        <NumberInput label="Pitch of A4" unit="Hz" {...state.numberField("referenceHz")} />
        <TemperamentField
          value={form.watch("temperament")}
          onChange={(value) => {
            form.setValue("temperament", value, { shouldDirty: true });
            form.clearErrors("temperament");
          }}
          error={messageOf(errors, "temperament")}
          errors={Array.from({ length: 12 }, (_, index) => messageOf(errors, `temperament.${index}`))}
        />
      </div>
      <TextArea
        label="Standing note"
        help="What the player asked for once and for all, in their own words."
        optional
        words
        rows={3}
        {...state.field("standingNote")}
      />
    </>
  );
}

function messageOf(errors: FieldErrors, path: string): string | undefined {
  let at: unknown = errors;
  for (const part of path.split(".")) {
    at = typeof at === "object" && at !== null ? (at as Record<string, unknown>)[part] : undefined;
  }
  if (typeof at !== "object" || at === null || !("message" in at)) return undefined;
  return typeof at.message === "string" ? at.message : undefined;
}
