"use client";

import { useEffect, useRef } from "react";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { StateWord } from "@/components/ui/state-word";

/** Shown this once: the page never gets them again. */
export function RecoveryCodes({ codes, onDone }: { codes: readonly string[]; onDone: () => void }) {
  const heading = useRef<HTMLParagraphElement>(null);
  useEffect(() => heading.current?.focus(), []);

  async function copy() {
    try {
      await navigator.clipboard.writeText(codes.join("\n"));
      showMessage({ text: "The codes are copied." });
    } catch {
      showMessage({
        kind: "attention",
        text: "The browser did not allow copying.",
        detail: "Print them, or write them down.",
      });
    }
  }

  return (
    <div className="grid gap-4">
      <p ref={heading} tabIndex={-1} className="outline-none">
        <StateWord kind="done" wrap>
          Two-step sign-in is on. Keep these recovery codes.
        </StateWord>
      </p>
      <p>
        Each opens the book once when your phone is lost. They are shown only now: print them, or keep them
        where you keep passwords.
      </p>
      <ul className="grid max-w-90 grid-cols-2 gap-x-6 gap-y-1 border-y border-hairline py-3 text-16 font-medium">
        {codes.map((code) => (
          <li key={code}>{code}</li>
        ))}
      </ul>
      <div className="flex flex-wrap gap-2" data-no-print>
        <Button onClick={copy}>Copy the codes</Button>
        <Button onClick={() => window.print()}>Print the codes</Button>
        <Button kind="primary" onClick={onDone}>
          I have kept them
        </Button>
      </div>
    </div>
  );
}
