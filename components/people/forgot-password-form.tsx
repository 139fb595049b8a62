"use client";

import { useState } from "react";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { StateWord } from "@/components/ui/state-word";
import { resetRequest } from "@/lib/people/schema";
import { MailboxLink } from "./mailbox-link";
import type { MailingTo } from "./mailing-to";

export function ForgotPasswordForm({
  action,
  mailboxHref,
  unavailable,
}: {
  action: MailingTo;
  mailboxHref: string | null;
  unavailable: string | null;
}) {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const state = useActionForm({
    schema: resetRequest,
    action,
    defaultValues: { email: "" },
    onSuccess: ({ email }) => setSentTo(email),
  });
  if (sentTo) {
    return (
      <div role="status" className="grid gap-3 text-16">
        <StateWord kind="done" wrap>
          <span className="break-words">If {sentTo} has a sign-in here, a mail is on its way.</span>
        </StateWord>
        <p>The link in it works once, for one hour. Look among the unwanted mail if it does not come.</p>
        <MailboxLink href={mailboxHref} />
      </div>
    );
  }
  return (
    <ActionForm state={state} label="Forgotten password">
      <TextInput
        label="Mail address"
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        {...state.field("email")}
      />
      <SubmitButton
        state={state}
        size="big"
        busyLabel="Sending the link"
        disabledReason={unavailable ?? undefined}
      >
        Send the link
      </SubmitButton>
    </ActionForm>
  );
}
