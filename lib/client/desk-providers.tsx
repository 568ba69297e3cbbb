"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { NuqsAdapter } from "nuqs/adapters/next/app";
import { useState, type ReactNode } from "react";
import { isApiError } from "./api-error";

/** Fetching for lists and forms, and state that lives in the URL. */
export function DeskProviders({ children }: { children: ReactNode }) {
  const [client] = useState(makeQueryClient);
  return (
    <QueryClientProvider client={client}>
      <NuqsAdapter>{children}</NuqsAdapter>
    </QueryClientProvider>
  );
}

function makeQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      // A refusal is an answer: only silence is worth asking again.
      queries: { staleTime: 5000, retry: (tries, error) => isApiError(error) && error.isUnanswered && tries < 2 },
      mutations: { retry: false },
    },
  });
}
