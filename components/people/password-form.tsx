"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { showMessage } from "@/components/ui/message-queue";
import { shortestWithSecondStep } from "@/lib/auth/passwords";
import type { ActionResult } from "@/lib/doors/action-result";
import { passwordChange } from "@/lib/people/schema";
import { passwordHelp } from "./password-help";

export function PasswordForm({
  action,
  email,
  secondStep,
}: {
  action: (input: unknown) => Promise<ActionResult<null>>;
  email: string;
  secondStep: boolean;
}) {
  const state = useActionForm({
    schema: passwordChange,
    action,
    defaultValues: { currentPassword: "", newPassword: "" },
    onSuccess: () => {
      state.form.reset();
      showMessage({ text: "The new password is set.", detail: "All your other devices are signed out." });
    },
  });
  return (
    <ActionForm state={state} label="Password">
      {/* Tells a password keeper whose password changes. */}
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <PasswordInput label="Present password" {...state.field("currentPassword")} />
      <PasswordInput
        label="New password"
        autoComplete="new-password"
        help={
          secondStep
            ? `At least ${shortestWithSecondStep} characters beside your second step; longer is better.`
            : passwordHelp
        }
        {...state.field("newPassword")}
      />
      <div>
        <SubmitButton state={state} kind="secondary" busyLabel="Setting the password">
          Set the new password
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
