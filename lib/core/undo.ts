/**
 * Invariant: who saved a record may take it back for ten minutes from when it was written, and nobody else;
 * later a lead or coordinator corrects.
 */
import type { ErrorCode } from "./errors";
import type { Instant } from "./time";

/** Undo runs this long from recordedAt. */
export const UNDO_MS = 10 * 60 * 1000;

/** Is undo still open? It runs from when the record was written, not from when it happened. */
export function mayStillUndo(recordedAt: Instant, now: Instant): boolean {
  return now - recordedAt <= UNDO_MS;
}

/** Until when whoever saved a record may take it back. */
export function undoUntil(recordedAt: number): number {
  return recordedAt + UNDO_MS;
}

export type UndoVerdict =
  | "fine"
  | Extract<ErrorCode, "undone-already" | "corrected-already" | "undo-not-yours" | "undo-too-late">;

/** May this person take it back now? A record that was corrected or undone is told apart from one that is too old. */
export function judgeUndo(
  record: { state: string; doneBy: string; recordedAt: Instant },
  person: string,
  now: Instant,
): UndoVerdict {
  if (record.state === "undone") return "undone-already";
  if (record.state === "corrected") return "corrected-already";
  if (record.doneBy !== person) return "undo-not-yours";
  return mayStillUndo(record.recordedAt, now) ? "fine" : "undo-too-late";
}
