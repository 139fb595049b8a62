"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { openShopInput } from "@/lib/people/schema";
import type { ShopChoices } from "@/lib/shop/choices";
import { type GoingOn, goTo } from "./go-to";
import { ShopBeginningFields } from "./shop-beginning-fields";

export function OpenShopForm({
  action,
  shopId,
  choices,
}: {
  action: GoingOn;
  shopId: string;
  choices: ShopChoices;
}) {
  const state = useActionForm({
    schema: openShopInput,
    action,
    defaultValues: {
      shopId,
      shopName: "",
      country: choices.country,
      timeZone: "UTC",
      locale: choices.locale,
    },
    onSuccess: goTo,
  });
  return (
    <ActionForm state={state} label="Open a shop">
      <ShopBeginningFields
        choices={choices}
        shopName={state.field("shopName")}
        country={state.field("country")}
        timeZone={state.field("timeZone")}
        takeTimeZone={(zone) => state.form.setValue("timeZone", zone)}
      />
      <SubmitButton state={state} size="big" busyLabel="Opening the book">
        Open the book
      </SubmitButton>
    </ActionForm>
  );
}
