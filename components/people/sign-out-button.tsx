"use client";

import { useState } from "react";
import { Button, type ButtonProps } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { type GoingOn, goTo } from "./go-to";

/** Signs out and leaves for the sign-in page; `next` is where the next sign-in should lead. */
export function SignOutButton({
  action,
  next,
  children = "Sign out",
  ...look
}: { action: GoingOn; next?: string } & Pick<ButtonProps, "kind" | "size" | "className" | "children">) {
  const [busy, setBusy] = useState(false);
  async function press() {
    setBusy(true);
    try {
      const result = await action({ next });
      if (result.ok) return await goTo(result.data);
      showMessage({ kind: "attention", text: result.error.message });
    } catch {
      showMessage({
        kind: "attention",
        text: "You are still signed in.",
        detail: "The server did not answer. Check the connection and try again.",
      });
    }
    setBusy(false);
  }
  return (
    <Button {...look} busy={busy} onClick={press}>
      {children}
    </Button>
  );
}
