/**
 * Worker threads: long reads (exports, verify) belong there, with a connection of their own, so that no
 * request ever waits for them. `lib/cli/build-workers.mjs` bundles them beforehand.
 */
import "server-only";
import path from "node:path";
import { Worker } from "node:worker_threads";
import { log } from "./logger";

/** Verifying a million lines holds every lot and bag that is not empty. */
const MOST_HEAP_MB = 1024;

/**
 * Starts a worker of lib/cli.
 *
 * @param name of its source without the ending, such as "export-worker"
 * @param job what the worker finds in `workerData.job`; copied, so plain data only
 */
export function startWorker(name: string, job: unknown): Worker {
  // The bundler must not follow this path: the worker is read from disk when it starts.
  const file = path.join(/*turbopackIgnore: true*/ process.cwd(), ".next/workers", `${name}.mjs`);
  return new Worker(/*turbopackIgnore: true*/ file, {
    workerData: { job },
    // A long read makes much short-lived garbage; collected often, it never adds up.
    resourceLimits: { maxYoungGenerationSizeMb: 8, maxOldGenerationSizeMb: MOST_HEAP_MB },
  });
}

/** What a streaming worker answers to each "more". */
export type Piece = { piece: Uint8Array } | { end: true } | { failed: string };

/**
 * The pieces of a worker as a stream. The worker makes a piece only when the reader wants one, so that a
 * slow reader costs no memory; a reader that goes away ends the worker.
 *
 * @param worker answers every "more" with one {@link Piece}
 * @param name for the log, should it fail
 */
export function streamFromWorker(worker: Worker, name: string): ReadableStream<Uint8Array> {
  let settle: (() => void) | null = null;
  let over = false;
  const finish = (): void => {
    over = true;
    void worker.terminate();
    settle?.();
  };
  return new ReadableStream<Uint8Array>(
    {
      start(controller) {
        const fail = (cause: unknown): void => {
          if (over) return;
          log.error("worker-failed", cause, { name });
          controller.error(cause);
          finish();
        };
        worker.on("error", fail);
        worker.on("exit", (code) => fail(new Error(`the worker left with code ${code}`)));
        worker.on("message", (message: Piece) => {
          if (over) return;
          if ("failed" in message) return fail(new Error(message.failed));
          if ("end" in message) {
            controller.close();
            return finish();
          }
          controller.enqueue(message.piece);
          settle?.();
        });
      },
      pull() {
        if (over) return;
        return new Promise<void>((resolve) => {
          settle = resolve;
          worker.postMessage("more");
        });
      },
      cancel() {
        finish();
      },
    },
    // One piece waits at most: the next is made when the reader has taken it.
    { highWaterMark: 1 },
  );
}
