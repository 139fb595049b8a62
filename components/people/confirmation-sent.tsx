"use client";

import { StateWord } from "@/components/ui/state-word";
import { MailboxLink } from "./mailbox-link";
import type { MailingTo } from "./mailing-to";
import { SendConfirmationAgain } from "./send-confirmation-again";

/** The same words whether the address is known or not: what is true of it stands in the mail. */
export function ConfirmationSent({
  email,
  sendAgain,
  mailboxHref,
}: {
  email: string;
  sendAgain: MailingTo;
  mailboxHref: string | null;
}) {
  return (
    <div className="grid gap-4 text-16">
      <p role="status">
        <StateWord kind="done" wrap>
          <span className="break-words">We have sent a mail to {email}. Open its link to go on.</span>
        </StateWord>
      </p>
      <MailboxLink href={mailboxHref} />
      <p className="text-ink-soft">
        The link works for one day. Look among the unwanted mail if it does not come.
      </p>
      <SendConfirmationAgain email={email} action={sendAgain} />
    </div>
  );
}
