"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { StateWord } from "@/components/ui/state-word";
import type { ActionResult } from "@/lib/doors/action-result";

type Act = (input: unknown) => Promise<ActionResult<unknown>>;

export function SessionList({
  sessions,
  endAction,
  endOthersAction,
}: {
  sessions: ReadonlyArray<{ id: string; current: boolean; device: string; details: string }>;
  endAction: Act;
  endOthersAction: Act;
}) {
  const [busy, setBusy] = useState<string | null>(null);
  const others = sessions.filter(({ current }) => !current).length;

  async function act(which: string, run: () => ReturnType<Act>, done: string) {
    setBusy(which);
    const result = await run().catch(() => null);
    setBusy(null);
    if (result?.ok) showMessage({ text: done });
    else
      showMessage({
        kind: "attention",
        text: result?.error.message ?? "The server did not answer. Try again.",
      });
  }

  return (
    <>
      <ul className="border-t border-hairline">
        {sessions.map(({ id, current, device, details }) => (
          <li
            key={id}
            className="flex min-h-11 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
          >
            <div className="min-w-0">
              <div className="font-medium">{device}</div>
              <div className="lab break-words">{details}</div>
            </div>
            {current ? (
              <StateWord kind="done">this device</StateWord>
            ) : (
              <Button
                kind="quiet"
                busy={busy === id}
                aria-label={`Sign out ${device}, ${details}`}
                onClick={() => act(id, () => endAction({ id }), `${device} is signed out.`)}
              >
                Sign out
              </Button>
            )}
          </li>
        ))}
      </ul>
      {others > 0 ? (
        <Button
          className="mt-3"
          busy={busy === "others"}
          onClick={() => act("others", () => endOthersAction({}), "Every device but this one is signed out.")}
        >
          Sign out every other device
        </Button>
      ) : null}
    </>
  );
}
