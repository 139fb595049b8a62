"use client";

import { useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { type Picked, RecordPicker } from "@/components/records/record-picker";
import { LinkButton } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { instrumentKeys } from "@/lib/instruments/keys";
import { type InstrumentRecord, newInstrument } from "@/lib/instruments/schema";
import { InstrumentFields } from "./instrument-fields";

/** A new instrument at its place. The id is made beforehand, so that sending twice makes one. */
export function NewInstrumentForm({
  action,
  newId,
  today,
  referenceHz,
  site,
  owner,
  back,
}: {
  action: (input: unknown) => Promise<ActionResult<InstrumentRecord>>;
  newId: string;
  today: string;
  referenceHz: number;
  site: Picked | null;
  owner: Picked | null;
  back: string;
}) {
  const router = useRouter();
  const client = useQueryClient();
  const [picked, setPicked] = useState({ site, owner });
  const state = useActionForm({
    schema: newInstrument,
    action,
    defaultValues: {
      id: newId,
      siteId: site?.id ?? "",
      ownerId: owner?.id,
      since: today,
      maker: "",
      model: "",
      serial: "",
      year: null,
      kind: "grand" as const,
      room: "",
      firstMidi: 21,
      lastMidi: 108,
      breakMidi: null,
      referenceHz,
      temperament: "equal" as const,
      standingNote: "",
    },
    onSuccess: async (saved: InstrumentRecord) => {
      await client.invalidateQueries({ queryKey: instrumentKeys.all });
      showMessage({ text: `${saved.name} is in the book.` });
      router.push(`/instruments/${saved.id}/record` as Route);
    },
  });
  const errors = state.form.formState.errors;
  return (
    <ActionForm state={state} label="New instrument" className="max-w-160">
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <RecordPicker
          of="sites"
          name="siteId"
          label="Site"
          help="Where it stands."
          value={picked.site}
          error={errors.siteId?.message}
          onChange={(next) => {
            setPicked((old) => ({ ...old, site: next }));
            state.form.setValue("siteId", next?.id ?? "", { shouldValidate: true });
          }}
        />
        <RecordPicker
          of="customers"
          name="ownerId"
          label="Owner"
          optional
          help="The site’s customer, if left empty."
          value={picked.owner}
          error={errors.ownerId?.message}
          onChange={(next) => {
            setPicked((old) => ({ ...old, owner: next }));
            state.form.setValue("ownerId", next?.id, { shouldValidate: true });
          }}
        />
        <TextInput label="There since" type="date" max={today} {...state.field("since")} />
      </div>
      <InstrumentFields state={state} />
      <div className="flex flex-wrap items-center gap-3">
        <SubmitButton state={state} busyLabel="Saving">
          Add instrument
        </SubmitButton>
        <LinkButton kind="quiet" href={back}>
          Leave it
        </LinkButton>
      </div>
    </ActionForm>
  );
}
