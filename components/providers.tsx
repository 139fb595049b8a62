"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { type ReactNode, useState } from "react";
import { ProblemError } from "@/lib/client/fetch-json";
import { Messages } from "./ui/messages";

export function makeQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        // Asked even without network: what fails says so at once, instead of waiting in silence.
        networkMode: "always",
        staleTime: 30_000,
        // A refusal (4xx) will be the same the second time; only silence and 5xx are worth asking again.
        retry: (failures, error) =>
          failures < 2 && !(error instanceof ProblemError && error.status >= 400 && error.status < 500),
        retryDelay: (attempt) => Math.min(500 * 2 ** attempt, 4_000),
      },
      mutations: { networkMode: "always", retry: false },
    },
  });
}

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(makeQueryClient);
  return (
    <QueryClientProvider client={client}>
      {children}
      <Messages />
    </QueryClientProvider>
  );
}
