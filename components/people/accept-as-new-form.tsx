"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { acceptAsNewInput } from "@/lib/people/schema";
import { type GoingOn, goTo } from "./go-to";
import { passwordHelp } from "./password-help";

export function AcceptAsNewForm({ action, token, email }: { action: GoingOn; token: string; email: string }) {
  const state = useActionForm({
    schema: acceptAsNewInput,
    action,
    defaultValues: { token, name: "", password: "" },
    onSuccess: goTo,
  });
  return (
    <ActionForm state={state} label="Accept the invitation">
      {/* Read-only, but in the form: password keepers store it with the password. */}
      <TextInput label="Mail address" type="email" autoComplete="username" value={email} fixed="as invited" />
      <TextInput label="Your name" autoComplete="name" {...state.field("name")} />
      <PasswordInput
        label="Password"
        autoComplete="new-password"
        help={passwordHelp}
        {...state.field("password")}
      />
      <SubmitButton state={state} size="big" busyLabel="Joining">
        Accept the invitation
      </SubmitButton>
    </ActionForm>
  );
}
