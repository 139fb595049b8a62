"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { AppLink } from "@/components/ui/app-link";
import { resetInput } from "@/lib/people/schema";
import { type GoingOn, goTo } from "./go-to";
import { passwordHelp } from "./password-help";

export function ResetPasswordForm({ action, token }: { action: GoingOn; token: string }) {
  const state = useActionForm({
    schema: resetInput,
    action,
    defaultValues: { token, password: "" },
    onSuccess: goTo,
  });
  const linkIsDead = state.failure?.code === "invalid" && !state.form.formState.errors.password;
  return (
    <ActionForm state={state} label="Set a new password">
      <PasswordInput
        label="New password"
        autoComplete="new-password"
        help={passwordHelp}
        {...state.field("password")}
      />
      {linkIsDead ? (
        <AppLink href="/forgot-password" className="link link-alone">
          Ask for a new link
        </AppLink>
      ) : null}
      <SubmitButton state={state} size="big" busyLabel="Setting the password">
        Set the password
      </SubmitButton>
    </ActionForm>
  );
}
