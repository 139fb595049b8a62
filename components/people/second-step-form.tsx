"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { codeInput, recoveryCodeInput } from "@/lib/people/schema";
import { type GoingOn, goTo } from "./go-to";

export function SecondStepForm({
  recovery,
  action,
  next,
}: {
  recovery: boolean;
  action: GoingOn;
  next: string;
}) {
  const state = useActionForm({
    schema: recovery ? recoveryCodeInput : codeInput,
    action,
    defaultValues: { code: "", next },
    onSuccess: goTo,
  });
  return (
    <ActionForm state={state} label="Second step">
      {recovery ? (
        <TextInput
          label="Recovery code"
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
          placeholder="xxxxx-xxxxx"
          {...state.field("code")}
        />
      ) : (
        <TextInput
          label="Code"
          inputMode="numeric"
          autoComplete="one-time-code"
          maxLength={11}
          {...state.field("code")}
        />
      )}
      <SubmitButton state={state} size="big" busyLabel="Signing in">
        Sign in
      </SubmitButton>
    </ActionForm>
  );
}
