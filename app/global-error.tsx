"use client";

import { Button } from "@/components/ui/button";
import { errorReference } from "@/components/ui/error-reference";
import { ErrorState } from "@/components/ui/states";
import "./globals.css";

/** Takes the whole document's place when even the root layout failed, so it brings its own. */
export default function GlobalError({ error, retry }: { error: unknown; retry: () => void }) {
  return (
    <html lang="en">
      <body>
        <title>Agraffe could not start</title>
        <main className="mx-auto max-w-120 px-4 py-12">
          <h1>Agraffe could not start</h1>
          <ErrorState
            title="The page failed before it was drawn"
            reference={errorReference(error)}
            action={<Button onClick={retry}>Try again</Button>}
          >
            What was saved is safe.
          </ErrorState>
        </main>
      </body>
    </html>
  );
}
