"use client";

import { useState } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { signUpForm } from "@/lib/people/schema";
import type { ShopChoices } from "@/lib/shop/choices";
import { ConfirmationSent } from "./confirmation-sent";
import type { MailingTo } from "./mailing-to";
import { passwordHelp } from "./password-help";
import { ShopBeginningFields } from "./shop-beginning-fields";

export function SignUpForm({
  action,
  sendAgain,
  mailboxHref,
  unavailable,
  next,
  shopId,
  choices,
}: {
  action: MailingTo;
  sendAgain: MailingTo;
  mailboxHref: string | null;
  unavailable: string | null;
  next: string;
  shopId: string;
  choices: ShopChoices;
}) {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const state = useActionForm({
    schema: signUpForm,
    action,
    defaultValues: {
      name: "",
      email: "",
      password: "",
      shopId,
      shopName: "",
      country: choices.country,
      timeZone: "UTC",
      locale: choices.locale,
      next,
    },
    onSuccess: ({ email }) => setSentTo(email),
  });
  if (sentTo) return <ConfirmationSent email={sentTo} sendAgain={sendAgain} mailboxHref={mailboxHref} />;
  return (
    <ActionForm state={state} label="Open your shop’s book">
      <TextInput label="Your name" autoComplete="name" {...state.field("name")} />
      <TextInput
        label="Mail address"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        {...state.field("email")}
      />
      <PasswordInput
        label="Password"
        autoComplete="new-password"
        help={passwordHelp}
        {...state.field("password")}
      />
      <ShopBeginningFields
        choices={choices}
        shopName={state.field("shopName")}
        country={state.field("country")}
        timeZone={state.field("timeZone")}
        takeTimeZone={(zone) => state.form.setValue("timeZone", zone)}
      />
      <SubmitButton
        state={state}
        size="big"
        busyLabel="Opening the book"
        disabledReason={unavailable ?? undefined}
      >
        Open the book
      </SubmitButton>
    </ActionForm>
  );
}
