"use client";

import { useState } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { StateWord } from "@/components/ui/state-word";
import { confirmationRequest } from "@/lib/people/schema";
import type { MailingTo } from "./mailing-to";

export function SendConfirmationAgain({ email, action }: { email: string; action: MailingTo }) {
  const [sent, setSent] = useState(false);
  const state = useActionForm({
    schema: confirmationRequest,
    action,
    defaultValues: { email },
    onSuccess: () => setSent(true),
  });
  if (sent) {
    return (
      <p role="status">
        <StateWord kind="done" wrap>
          If the address still waits to be confirmed, the mail is on its way again.
        </StateWord>
      </p>
    );
  }
  return (
    <ActionForm state={state} label="Send the mail again">
      <div>
        <SubmitButton state={state} kind="secondary" busyLabel="Sending the mail">
          Send the mail again
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
