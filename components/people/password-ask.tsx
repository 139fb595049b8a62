"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { PasswordInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import type { ActionResult } from "@/lib/doors/action-result";
import { passwordCheck } from "@/lib/people/schema";

/** Asked again before anything that would make the account easier to enter. */
export function PasswordAsk<Data>({
  label,
  help,
  button,
  action,
  onSuccess,
  onCancel,
}: {
  label: string;
  help?: string;
  button: string;
  action: (input: unknown) => Promise<ActionResult<Data>>;
  onSuccess: (data: Data) => void;
  onCancel: () => void;
}) {
  const state = useActionForm({
    schema: passwordCheck,
    action,
    defaultValues: { password: "" },
    onSuccess,
  });
  return (
    <ActionForm state={state} label={label}>
      <PasswordInput label={`${label}: your password`} help={help} {...state.field("password")} />
      <div className="flex flex-wrap gap-2">
        <SubmitButton state={state}>{button}</SubmitButton>
        <Button onClick={onCancel}>Leave it as it is</Button>
      </div>
    </ActionForm>
  );
}
