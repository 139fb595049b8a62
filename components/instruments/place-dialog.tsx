"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useId, useState } from "react";
import { FormError, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { type Picked, RecordPicker } from "@/components/records/record-picker";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { instrumentKeys } from "@/lib/instruments/keys";
import { type HoldingRecord, type InstrumentRecord, placeForm } from "@/lib/instruments/schema";

type Action = (input: unknown) => Promise<ActionResult<InstrumentRecord>>;
type Parties = { site: Picked | null; owner: Picked | null; payer: Picked | null; contact: Picked | null };

const picked = (id: string | null, name: string | null): Picked | null =>
  id ? { id, label: name ?? "" } : null;

function partiesOf(place: HoldingRecord | null): Parties {
  return {
    site: picked(place?.siteId ?? null, place?.siteName ?? null),
    owner: picked(place?.ownerId ?? null, place?.ownerName ?? null),
    payer: picked(place?.payerId ?? null, place?.payerName ?? null),
    contact: picked(place?.bookingContactId ?? null, place?.bookingContactName ?? null),
  };
}

/**
 * "move" closes the present place on a day and opens another; "correct" puts a slip in the present one
 * right without making history of it.
 */
export function PlaceDialog({
  mode,
  instrument,
  newId,
  today,
  action,
  onClose,
}: {
  mode: "move" | "correct";
  instrument: InstrumentRecord;
  newId: string;
  today: string;
  action: Action;
  onClose: () => void;
}) {
  const formId = useId();
  const router = useRouter();
  const client = useQueryClient();
  const moving = mode === "move";
  const [parties, setParties] = useState<Parties>(() =>
    moving ? { site: null, owner: null, payer: null, contact: null } : partiesOf(instrument.place),
  );
  const state = useActionForm({
    schema: placeForm,
    action,
    defaultValues: {
      instrumentId: instrument.id,
      id: moving ? newId : undefined,
      version: instrument.version,
      siteId: parties.site?.id ?? "",
      ownerId: parties.owner?.id,
      payerId: parties.payer?.id ?? null,
      bookingContactId: parties.contact?.id ?? null,
      since: moving ? today : (instrument.place?.since ?? today),
    },
    onSuccess: async (saved: InstrumentRecord) => {
      await client.invalidateQueries({ queryKey: instrumentKeys.all });
      showMessage({
        text: moving
          ? `${saved.name} stands at ${saved.place?.siteName ?? "its new place"} now.`
          : `The place of ${saved.name} is corrected.`,
      });
      onClose();
      router.refresh();
    },
  });
  const errors = state.form.formState.errors;
  const { current } = state.failure ?? {};
  const newer = state.failure?.code === "stale" ? (current as InstrumentRecord) : null;

  function choose(part: keyof Parties, field: "siteId" | "ownerId" | "payerId" | "bookingContactId") {
    return (next: Picked | null) => {
      setParties((old) => ({ ...old, [part]: next }));
      const none = field === "siteId" ? "" : field === "ownerId" ? undefined : null;
      state.form.setValue(field, next?.id ?? none, { shouldDirty: true });
      state.form.clearErrors(field);
    };
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={moving ? "Moved or sold" : "Correct place and owner"}
      className="w-[min(560px,calc(100vw-32px))]! overflow-visible"
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <SubmitButton state={state} form={formId} busyLabel="Saving">
            {moving ? "Record the move" : "Save place"}
          </SubmitButton>
        </>
      }
    >
      <form id={formId} noValidate onSubmit={state.submit} className="mt-3 grid gap-4">
        <FormError state={state} />
        {newer ? (
          <div>
            <p className="mb-2">
              It is at {newer.place?.siteName ?? "no place"} now, owned by{" "}
              {newer.place?.ownerName ?? "nobody"}.
            </p>
            <Button
              size="small"
              onClick={() => {
                state.form.setValue("version", newer.version);
                void state.submit();
              }}
            >
              Save mine over it
            </Button>
          </div>
        ) : null}
        <p className="text-ink-soft">
          {moving
            ? "Its history stays with it. A former owner no longer sees it from that day on."
            : "For a slip of the pen. If it went somewhere else, use “Moved or sold”."}
        </p>
        <TextInput label={moving ? "On" : "There since"} type="date" max={today} {...state.field("since")} />
        <RecordPicker
          of="sites"
          name="siteId"
          label="Site"
          value={parties.site}
          error={errors.siteId?.message}
          onChange={choose("site", "siteId")}
        />
        <RecordPicker
          of="customers"
          name="ownerId"
          label="Owner"
          optional
          help="The site’s customer, if left empty."
          value={parties.owner}
          error={errors.ownerId?.message}
          onChange={choose("owner", "ownerId")}
        />
        <div className="grid gap-4 sm:grid-cols-2">
          <RecordPicker
            of="customers"
            name="payerId"
            label="Who pays"
            optional
            help="The owner, if left empty."
            value={parties.payer}
            error={errors.payerId?.message}
            onChange={choose("payer", "payerId")}
          />
          <RecordPicker
            of="customers"
            name="bookingContactId"
            label="Who books"
            optional
            help="The owner, if left empty."
            value={parties.contact}
            error={errors.bookingContactId?.message}
            onChange={choose("contact", "bookingContactId")}
          />
        </div>
      </form>
    </Dialog>
  );
}
