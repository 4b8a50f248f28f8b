import type { Effort } from "../scan-engine";

/** A picture for the worker: RGBA rows, handed over and not copied. */
export type WorkerRequest = {
  id: number;
  effort: Effort;
  width: number;
  height: number;
  pixels: ArrayBuffer;
};

export type WorkerAnswer =
  | { kind: "ready" }
  /** It cannot work here and never will. */
  | { kind: "broken"; why: string }
  | { kind: "read"; id: number; text: string | null };
