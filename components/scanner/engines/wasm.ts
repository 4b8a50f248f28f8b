import type { Effort, ScanEngine } from "../scan-engine";
import type { WorkerAnswer, WorkerRequest } from "../worker/messages";

/** Built by lib/cli/build-scanner.mjs; its answer carries the policy that allows it WebAssembly. */
const WORKER_ADDRESS = "/scanner/scan-worker.js";
/** A worker that is silent for so long is dead: out of memory, or ended by the system. */
const SILENT_MS: Record<Effort, number> = { live: 10_000, photo: 45_000, glance: 45_000 };

type Waiting = { resolve: (text: string | null) => void; reject: (error: Error) => void };

/**
 * zxing-cpp in a worker of its own: the page stays free, and only the worker may run WebAssembly.
 *
 * @throws Error where the worker or its WebAssembly cannot be had
 */
export async function wasmEngine(): Promise<ScanEngine> {
  const worker = new Worker(WORKER_ADDRESS, { name: "scanner" });
  const waiting = new Map<number, Waiting>();
  let asked = 0;

  const fail = (error: Error): void => {
    worker.terminate();
    for (const { reject } of waiting.values()) reject(error);
    waiting.clear();
  };
  await new Promise<void>((resolve, reject) => {
    worker.onerror = (event) => {
      const error = new Error(event.message || "the scanner's worker did not start");
      reject(error);
      fail(error);
    };
    worker.onmessage = ({ data }: MessageEvent<WorkerAnswer>) => {
      if (data.kind === "ready") resolve();
      else if (data.kind === "broken") {
        const error = new Error(data.why);
        reject(error);
        fail(error);
      } else {
        waiting.get(data.id)?.resolve(data.text);
        waiting.delete(data.id);
      }
    };
  });

  return {
    name: "wasm",
    decode(picture, effort) {
      const context = picture.getContext("2d", { willReadFrequently: true });
      if (!context) return Promise.reject(new Error("no canvas"));
      const { width, height } = picture;
      const pixels = context.getImageData(0, 0, width, height).data.buffer;
      const request: WorkerRequest = { id: (asked += 1), effort, width, height, pixels };
      return new Promise<string | null>((resolve, reject) => {
        const timer = setTimeout(
          () => fail(new Error("the scanner's worker is silent")),
          SILENT_MS[effort],
        );
        waiting.set(request.id, {
          resolve: (text) => {
            clearTimeout(timer);
            resolve(text);
          },
          reject: (error) => {
            clearTimeout(timer);
            reject(error);
          },
        });
        worker.postMessage(request, [pixels]);
      });
    },
    close: () => fail(new Error("closed")),
  };
}
