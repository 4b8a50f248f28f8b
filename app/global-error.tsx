"use client";

import { PlainFailure } from "@/components/shell/plain-failure";
import "./globals.css";

type GlobalErrorProps = { error: Error & { digest?: string } };

/** The root layout itself failed, so this page brings its own; the system's fonts will do. */
export default function GlobalError({ error }: GlobalErrorProps) {
  return (
    <html lang="en">
      <head>
        <title>This page failed · Bismar</title>
      </head>
      <body className="flex min-h-dvh flex-col font-body antialiased">
        <PlainFailure digest={error.digest} onRetry={() => window.location.reload()} />
      </body>
    </html>
  );
}
