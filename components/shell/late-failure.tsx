"use client";

import { lazy, Suspense } from "react";
import type { FailureProps } from "./failure";
import { PlainFailure } from "./plain-failure";

const Failure = lazy(() =>
  import("./failure").then(
    (loaded) => ({ default: loaded.Failure }),
    () => ({ default: PlainFailure }),
  ),
);

/** The page of a failure, which travels when something failed. */
export function LateFailure(props: FailureProps) {
  return (
    <Suspense fallback={<PlainFailure {...props} />}>
      <Failure {...props} />
    </Suspense>
  );
}
