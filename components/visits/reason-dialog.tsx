"use client";

import { useState } from "react";
import { TextArea } from "@/components/forms/text-input";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { VisitState } from "@/lib/visits/rules";

const asks: Partial<Record<VisitState, { title: string; question: string }>> = {
  cancelled: { title: "Cancel this visit", question: "Why is it cancelled?" },
  missed: { title: "Nobody was there", question: "What happened?" },
  declined: { title: "The customer declined", question: "What did they say?" },
};

/** Asks why, before a step that lets somebody down. The words stay with the visit. */
export function ReasonDialog({
  to,
  busy,
  refused,
  onClose,
  onGive,
}: {
  to: VisitState | null;
  busy: boolean;
  refused: string | undefined;
  onClose: () => void;
  onGive: (reason: string) => void;
}) {
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const words = to ? asks[to] : undefined;
  const missing = asked && reason.trim() === "" ? "Say why in a few words." : undefined;
  return (
    <Dialog
      open={words !== undefined}
      onClose={onClose}
      title={words?.title ?? ""}
      actions={
        <>
          <Button data-safe="" onClick={onClose}>
            Keep the visit as it is
          </Button>
          <Button
            kind="primary"
            busy={busy}
            onClick={() => {
              setAsked(true);
              if (reason.trim()) onGive(reason.trim());
            }}
          >
            {words?.title ?? ""}
          </Button>
        </>
      }
    >
      <TextArea
        className="mt-3"
        label={words?.question ?? ""}
        rows={3}
        maxLength={500}
        value={reason}
        onChange={(event) => setReason(event.target.value)}
        error={missing ?? refused}
        words
      />
    </Dialog>
  );
}
