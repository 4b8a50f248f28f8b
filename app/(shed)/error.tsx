"use client";

import { Failure } from "@/components/shell/failure";

type ErrorProps = { error: Error & { digest?: string }; reset: () => void };

export default function ErrorPage({ error, reset }: ErrorProps) {
  return <Failure digest={error.digest} onRetry={reset} inFrame />;
}
