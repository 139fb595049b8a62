"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { StateWord } from "@/components/ui/state-word";
import type { ActionResult } from "@/lib/doors/action-result";
import { roleWords } from "@/lib/people/role-words";
import type { InvitationRecord } from "@/lib/people/schema";

type Shown = InvitationRecord & { sentWords: string; expiresWords: string };
type Act = (input: unknown) => Promise<ActionResult<unknown>>;

export function InvitationList({
  invitations,
  resendAction,
  revokeAction,
}: {
  invitations: readonly Shown[];
  resendAction: Act;
  revokeAction: Act;
}) {
  return (
    <ul className="border-t border-hairline">
      {invitations.map((invitation) => (
        <InvitationRow
          key={invitation.id}
          invitation={invitation}
          resendAction={resendAction}
          revokeAction={revokeAction}
        />
      ))}
    </ul>
  );
}

function InvitationRow({
  invitation,
  resendAction,
  revokeAction,
}: {
  invitation: Shown;
  resendAction: Act;
  revokeAction: Act;
}) {
  const [busy, setBusy] = useState<"resend" | "revoke" | null>(null);
  const { id, email, role, customerName, invitedBy, expired } = invitation;

  async function act(which: "resend" | "revoke", action: Act, done: string) {
    setBusy(which);
    const result = await action({ id }).catch(() => null);
    setBusy(null);
    if (result?.ok) showMessage({ text: done });
    else
      showMessage({
        kind: "attention",
        text: result?.error.message ?? "The server did not answer. Try again.",
      });
  }

  return (
    <li className="grid items-center gap-x-4 gap-y-1 border-b border-hairline py-2 sm:grid-cols-[minmax(0,1fr)_auto] lg:min-h-11">
      <div className="min-w-0">
        <div className="font-semibold break-words">{email}</div>
        <div className="lab">
          {roleWords[role]}
          {customerName ? ` for ${customerName}` : ""}, invited by {invitedBy} on {invitation.sentWords}
        </div>
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        <StateWord kind={expired ? "attention" : "waiting"}>
          {expired ? "expired" : `open until ${invitation.expiresWords}`}
        </StateWord>
        <span className="flex gap-1">
          <Button
            kind="quiet"
            busy={busy === "resend"}
            aria-label={`Send the invitation to ${email} again`}
            onClick={() =>
              act("resend", resendAction, `Sent again to ${email}. The earlier link no longer works.`)
            }
          >
            Send again
          </Button>
          <Button
            kind="quiet"
            busy={busy === "revoke"}
            aria-label={`Revoke the invitation to ${email}`}
            onClick={() => act("revoke", revokeAction, `The invitation to ${email} no longer works.`)}
          >
            Revoke
          </Button>
        </span>
      </div>
    </li>
  );
}
