"use client";

import { useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Select, type SelectOption } from "@/components/forms/select";
import { NumberInput, TextArea, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { differences, NewerVersion } from "@/components/records/newer-version";
import { type Picked, RecordPicker } from "@/components/records/record-picker";
import { LinkButton } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { siteKeys } from "@/lib/sites/keys";
import { type SiteRecord, siteForm } from "@/lib/sites/schema";

const labels = {
  name: "Name",
  street: "Street",
  postalCode: "Postal code",
  city: "Town",
  country: "Country",
  timeZone: "Time zone",
  accessNotes: "Getting in",
};

function valuesOf(record: SiteRecord) {
  const { id, version, customerId, name, street, postalCode, city, country, timeZone } = record;
  const { latitude, longitude, accessNotes } = record;
  return {
    ...{ id, version, customerId, name, street, postalCode, city, country, timeZone, latitude, longitude },
    accessNotes: accessNotes ?? "",
  };
}

export type SiteBeginning = { id: string; customer: Picked | null; country: string; timeZone: string };

/** A new site of a customer, or an old one changed. */
export function SiteForm({
  action,
  record,
  beginning,
  countries,
  timeZones,
}: {
  action: (input: unknown) => Promise<ActionResult<SiteRecord>>;
  countries: readonly SelectOption[];
  timeZones: readonly SelectOption[];
} & ({ record: SiteRecord; beginning?: undefined } | { record?: undefined; beginning: SiteBeginning })) {
  const router = useRouter();
  const client = useQueryClient();
  const [customer, setCustomer] = useState<Picked | null>(
    record ? { id: record.customerId, label: record.customerName } : beginning.customer,
  );
  const state = useActionForm({
    schema: siteForm,
    action,
    defaultValues: record
      ? valuesOf(record)
      : {
          id: beginning.id,
          customerId: beginning.customer?.id ?? "",
          name: "",
          street: "",
          postalCode: "",
          city: "",
          country: beginning.country,
          timeZone: beginning.timeZone,
          latitude: null,
          longitude: null,
          accessNotes: "",
        },
    onSuccess: async (saved: SiteRecord) => {
      await client.invalidateQueries({ queryKey: siteKeys.all });
      showMessage({ text: record ? `${saved.name} is saved.` : `${saved.name} is a site now.` });
      router.push(`/sites/${saved.id}` as Route);
    },
  });
  const newer = state.failure?.code === "stale" ? (state.failure.current as SiteRecord) : null;
  const back = record
    ? `/sites/${record.id}`
    : beginning.customer
      ? `/customers/${beginning.customer.id}`
      : "/sites";
  return (
    <ActionForm state={state} label={record ? "Change the site" : "New site"} className="max-w-160">
      {newer ? (
        <NewerVersion
          what="site"
          differing={differences(labels, shown(valuesOf(newer)), shown(state.form.getValues()))}
          onTakeSaved={() => {
            state.form.reset(valuesOf(newer));
            setCustomer({ id: newer.customerId, label: newer.customerName });
          }}
          onKeepMine={() => {
            state.form.setValue("version", newer.version);
            void state.submit();
          }}
        />
      ) : null}
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <RecordPicker
          of="customers"
          name="customerId"
          label="Customer"
          help={
            record && customer && customer.id !== record.customerId
              ? `Visits booked so far stay with ${record.customerName}.`
              : undefined
          }
          value={customer}
          error={state.form.formState.errors.customerId?.message}
          onChange={(next) => {
            setCustomer(next);
            state.form.setValue("customerId", next?.id ?? "", { shouldValidate: true });
          }}
        />
        <TextInput
          label="Name"
          help="“Main building”, “Home”, “Chapel”."
          autoComplete="off"
          {...state.field("name")}
        />
        <TextInput
          label="Street"
          optional
          autoComplete="off"
          className="sm:col-span-2"
          {...state.field("street")}
        />
        <TextInput label="Postal code" optional autoComplete="off" {...state.field("postalCode")} />
        <TextInput label="Town" optional autoComplete="off" {...state.field("city")} />
        <Select label="Country" options={countries} {...state.field("country")} />
        <Select label="Time zone" options={timeZones} {...state.field("timeZone")} />
        <NumberInput label="Latitude" optional unit="degrees" {...state.numberField("latitude")} />
        <NumberInput label="Longitude" optional unit="degrees" {...state.numberField("longitude")} />
        <TextArea
          label="Getting in"
          help="Doors, stairs, parking, whom to ring. For the shop only. No door codes here."
          optional
          words
          rows={3}
          className="sm:col-span-2"
          {...state.field("accessNotes")}
        />
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <SubmitButton state={state} busyLabel="Saving">
          {record ? "Save site" : "Add site"}
        </SubmitButton>
        <LinkButton kind="quiet" href={back}>
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
    street: values.street ?? "",
    postalCode: values.postalCode ?? "",
    city: values.city ?? "",
    country: values.country ?? "",
    timeZone: values.timeZone ?? "",
    accessNotes: values.accessNotes ?? "",
  };
}
