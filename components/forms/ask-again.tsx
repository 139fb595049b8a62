"use client";

import { useEffect, useRef, useState } from "react";
import { Button } from "../ui/button";
import { Sign } from "../ui/sign";
import type { ActionForm } from "./use-action-form";

/**
 * Stands beside the fields it asks about: done when it is sent once more. The question goes when these fields
 * change, for it was about what they said before.
 */
export function AskAgain({
  state,
  about,
  question,
  onYes,
}: {
  state: Pick<ActionForm, "failure" | "attempts" | "busy">;
  /** What the fields say now. */
  about: string;
  /** "Book it all the same" */
  question: string;
  onYes: () => void;
}) {
  const { failure, attempts, busy } = state;
  const [asked, setAsked] = useState({ attempts, about });
  if (asked.attempts !== attempts) setAsked({ attempts, about });
  const shown = failure?.code === "needs-confirming" && asked.about === about;
  const button = useRef<HTMLButtonElement>(null);
  const focusedFor = useRef(0);
  useEffect(() => {
    if (!shown || focusedFor.current === attempts) return;
    focusedFor.current = attempts;
    button.current?.focus();
  }, [shown, attempts]);

  if (!shown) return null;
  return (
    <div role="alert" className="border-l-3 border-brass! bg-brass-wash py-3 pr-3 pl-4">
      <p className="flex items-start gap-1.5">
        <Sign name="half" className="mt-[3px] text-brass" />
        <span>
          {failure.message} {question}?
        </span>
      </p>
      <Button ref={button} size="small" busy={busy} onClick={onYes} className="mt-2 ml-5">
        {question}
      </Button>
    </div>
  );
}
