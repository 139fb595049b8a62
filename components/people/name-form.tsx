"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { nameInput } from "@/lib/people/schema";

export function NameForm({
  action,
  name,
}: {
  action: (input: unknown) => Promise<ActionResult<{ name: string }>>;
  name: string;
}) {
  const state = useActionForm({
    schema: nameInput,
    action,
    defaultValues: { name },
    onSuccess: (saved) => showMessage({ text: `Your name stands as ${saved.name} in all your shops.` }),
  });
  return (
    <ActionForm state={state} label="Name">
      <TextInput
        label="Your name"
        help="As colleagues and customers see it."
        autoComplete="name"
        {...state.field("name")}
      />
      <div>
        <SubmitButton state={state} kind="secondary" busyLabel="Saving">
          Save the name
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
