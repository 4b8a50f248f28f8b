import type { FailureProps } from "./failure";

/**
 * A failed page in its barest form: while the whole one is on its way, where that cannot be fetched, and where
 * nothing but the browser is left. Every page carries it, so it is small.
 */
export function PlainFailure({ digest, onRetry }: FailureProps) {
  return (
    <div role="alert" className="mx-auto w-full max-w-lg px-4 py-16">
      <h1 className="text-2xl">This page failed</h1>
      <p className="mt-3">What was saved before is safe.</p>
      {digest ? <p className="mt-3 font-mono">Request number {digest}</p> : null}
      <button type="button" onClick={onRetry} className="mt-5 min-h-12 font-bold underline">
        Try again
      </button>
    </div>
  );
}
