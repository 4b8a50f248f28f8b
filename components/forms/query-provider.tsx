"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useState, type ReactNode } from "react";
import { ProblemError } from "./problem-document";

/**
 * TanStack Query for the pages below. A browser's word on being online is not believed (it can say yes
 * without signal, and "online" may never fire), so requests always go out and are tried again by time.
 */
export function QueryProvider({ children }: { children: ReactNode }) {
  const [client] = useState(
    () =>
      new QueryClient({
        defaultOptions: {
          queries: {
            networkMode: "always",
            staleTime: 15_000,
            refetchOnWindowFocus: true,
            // A refusal stays a refusal; only a missing answer is worth another try.
            retry: (failures, error) => !(error instanceof ProblemError) && failures < 3,
            retryDelay: (failures) => Math.min(1000 * 2 ** failures, 10_000),
          },
          mutations: { networkMode: "always" },
        },
      }),
  );
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
