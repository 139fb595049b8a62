"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { AppLink } from "@/components/ui/app-link";
import { confirmInput } from "@/lib/people/schema";
import { type GoingOn, goTo } from "./go-to";

/** A press in the browser that signed up; elsewhere the password chosen there as well. */
export function ConfirmAddressForm({
  action,
  token,
  email,
  sameBrowser,
}: {
  action: GoingOn;
  token: string;
  email: string;
  sameBrowser: boolean;
}) {
  const state = useActionForm({
    schema: confirmInput,
    action,
    defaultValues: { token, password: "" },
    onSuccess: goTo,
  });
  return (
    <ActionForm state={state} label="Confirm your address">
      {/* Read-only, but in the form: password keepers find the password by it. */}
      <TextInput
        label="Mail address"
        type="email"
        autoComplete="username"
        value={email}
        fixed="from the link"
      />
      {sameBrowser ? null : (
        <>
          <PasswordInput
            label="Password"
            autoComplete="current-password"
            help="The one chosen on signing up. This browser was not the one."
            {...state.field("password")}
          />
          <AppLink href="/forgot-password" className="link link-alone">
            Forgotten, or not chosen by you? Set a new one
          </AppLink>
        </>
      )}
      <SubmitButton state={state} size="big" busyLabel="Confirming the address">
        Confirm and go on
      </SubmitButton>
    </ActionForm>
  );
}
