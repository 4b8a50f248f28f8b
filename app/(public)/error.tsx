"use client";

import { LateFailure } from "@/components/shell/late-failure";

type ErrorProps = { error: Error & { digest?: string }; reset: () => void };

export default function ErrorPage({ error, reset }: ErrorProps) {
  return <LateFailure digest={error.digest} onRetry={reset} inFrame />;
}
