"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Select, type SelectOption } from "@/components/forms/select";
import { NumberInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { type ShopRecord, shopChange } from "@/lib/shop/schema";

type Props = {
  action: (input: unknown) => Promise<ActionResult<ShopRecord>>;
  shop: ShopRecord;
  canChange: boolean;
  countries: readonly SelectOption[];
  currencies: readonly SelectOption[];
  timeZones: readonly SelectOption[];
  locales: readonly SelectOption[];
  styles: readonly SelectOption[];
};

export function ShopFactsForm({ action, shop, canChange, ...choices }: Props) {
  const { id: _id, demo: _demo, updatedAt: _updatedAt, ...fields } = shop;
  const state = useActionForm({
    schema: shopChange,
    action,
    defaultValues: fields,
    onSuccess: () => showMessage({ text: "The shop’s facts are saved." }),
  });
  const stale = state.failure?.code === "stale";
  return (
    <ActionForm state={state} label="Facts about the shop" className="max-w-160">
      <fieldset disabled={!canChange} className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <TextInput label="Name" className="sm:col-span-2" {...state.field("name")} />
        <Select label="Country" options={choices.countries} {...state.field("country")} />
        <Select label="Currency" options={choices.currencies} {...state.field("currency")} />
        <Select
          label="Time zone"
          help="Sites may lie in another; each keeps its own."
          options={withPresent(choices.timeZones, shop.timeZone)}
          {...state.field("timeZone")}
        />
        <Select label="Dates and numbers" options={choices.locales} {...state.field("locale")} />
        <NumberInput
          label="Reference pitch of A4"
          unit="Hz"
          help="New instruments begin with it."
          {...state.numberField("referenceHz")}
        />
        <Select
          label="Style of stretch"
          help="Plans begin with it; each plan may choose another."
          options={withPresent(choices.styles, shop.defaultStyle)}
          {...state.field("defaultStyle")}
        />
      </fieldset>
      {canChange ? (
        <div className="flex flex-wrap items-center gap-3">
          <SubmitButton state={state} busyLabel="Saving">
            Save the facts
          </SubmitButton>
          {stale ? (
            <a href="/shop" className="link">
              Load the newer version
            </a>
          ) : null}
        </div>
      ) : null}
    </ActionForm>
  );
}

/** What is set stays choosable, even where the list has lost it. */
function withPresent(options: readonly SelectOption[], value: string): readonly SelectOption[] {
  return options.some((option) => option.value === value) ? options : [{ value, label: value }, ...options];
}
