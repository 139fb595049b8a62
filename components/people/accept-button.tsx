"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { acceptInput } from "@/lib/people/schema";
import { type GoingOn, goTo } from "./go-to";

export function AcceptButton({ action, token }: { action: GoingOn; token: string }) {
  const state = useActionForm({ schema: acceptInput, action, defaultValues: { token }, onSuccess: goTo });
  return (
    <ActionForm state={state} label="Accept the invitation">
      <SubmitButton state={state} size="big" busyLabel="Joining">
        Accept the invitation
      </SubmitButton>
    </ActionForm>
  );
}
