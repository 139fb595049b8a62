"use client";

import { useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextArea, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { differences, NewerVersion } from "@/components/records/newer-version";
import { LinkButton } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { Segmented } from "@/components/ui/segmented";
import { customerKeys } from "@/lib/customers/keys";
import { type CustomerRecord, customerForm } from "@/lib/customers/schema";
import type { ActionResult } from "@/lib/doors/action-result";

type Action = (input: unknown) => Promise<ActionResult<CustomerRecord>>;

const labels = {
  name: "Name",
  contactName: "Contact",
  email: "E-mail",
  phone: "Telephone",
  notes: "Notes",
};

const kinds = [
  { value: "person", label: "Person" },
  { value: "organisation", label: "Organisation" },
] as const;

function valuesOf(record: CustomerRecord) {
  return {
    id: record.id,
    version: record.version,
    kind: record.kind,
    name: record.name,
    contactName: record.contactName ?? "",
    email: record.email ?? "",
    phone: record.phone ?? "",
    notes: record.notes ?? "",
  };
}

/** A new customer, under an id made beforehand so that sending twice makes one; or an old one changed. */
export function CustomerForm({
  action,
  ...what
}: { action: Action } & (
  | { newId: string; record?: undefined }
  | { record: CustomerRecord; newId?: undefined }
)) {
  const { record } = what;
  const router = useRouter();
  const client = useQueryClient();
  const state = useActionForm({
    schema: customerForm,
    action,
    defaultValues: record
      ? valuesOf(record)
      : {
          id: what.newId,
          kind: "person" as const,
          name: "",
          contactName: "",
          email: "",
          phone: "",
          notes: "",
        },
    onSuccess: async (saved: CustomerRecord) => {
      await client.invalidateQueries({ queryKey: customerKeys.all });
      showMessage({ text: record ? `${saved.name} is saved.` : `${saved.name} is a customer now.` });
      router.push(`/customers/${saved.id}` as Route);
    },
  });
  const kind = state.form.watch("kind");
  const newer = state.failure?.code === "stale" ? (state.failure.current as CustomerRecord) : null;
  return (
    <ActionForm state={state} label={record ? "Change the customer" : "New customer"} className="max-w-160">
      {newer ? (
        <NewerVersion
          what="customer"
          differing={differences(labels, shown(valuesOf(newer)), shown(state.form.getValues()))}
          onTakeSaved={() => state.form.reset(valuesOf(newer))}
          onKeepMine={() => {
            state.form.setValue("version", newer.version);
            void state.submit();
          }}
        />
      ) : null}
      <Segmented
        label="Kind"
        hideLabel={false}
        options={kinds}
        value={kind === "organisation" ? "organisation" : "person"}
        onChange={(value) => state.form.setValue("kind", value, { shouldDirty: true })}
      />
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <TextInput
          label="Name"
          className="sm:col-span-2"
          autoComplete="off"
          placeholder={kind === "organisation" ? "Averil Conservatory" : "Signe Lindqvist"}
          {...state.field("name")}
        />
        <TextInput
          label={kind === "organisation" ? "Contact" : "Also ask for"}
          help="Whom to ask for on the telephone."
          optional
          autoComplete="off"
          className="sm:col-span-2"
          {...state.field("contactName")}
        />
        <TextInput label="E-mail" optional type="email" autoComplete="off" {...state.field("email")} />
        <TextInput label="Telephone" optional type="tel" autoComplete="off" {...state.field("phone")} />
        <TextArea
          label="Notes"
          help="For the shop only: customers never see them."
          optional
          className="sm:col-span-2"
          {...state.field("notes")}
        />
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <SubmitButton state={state} busyLabel="Saving">
          {record ? "Save customer" : "Add customer"}
        </SubmitButton>
        <LinkButton kind="quiet" href={record ? `/customers/${record.id}` : "/customers"}>
          Leave it
        </LinkButton>
      </div>
    </ActionForm>
  );
}

function shown(
  values: Partial<Record<keyof typeof labels, string | null>>,
): Record<keyof typeof labels, string> {
  return {
    name: values.name ?? "",
    contactName: values.contactName ?? "",
    email: values.email ?? "",
    phone: values.phone ?? "",
    notes: values.notes ?? "",
  };
}
