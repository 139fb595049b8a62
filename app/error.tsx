"use client";

import { Button } from "@/components/ui/button";
import { errorReference } from "@/components/ui/error-reference";
import { ErrorState } from "@/components/ui/states";

export default function PageError({ error, retry }: { error: unknown; retry: () => void }) {
  return (
    <main className="mx-auto max-w-120 px-4 py-12">
      <ErrorState
        title="This page could not be shown"
        reference={errorReference(error)}
        action={<Button onClick={retry}>Try again</Button>}
      >
        Something went wrong on our side. What was saved is safe.
      </ErrorState>
    </main>
  );
}
