/**
 * An entry made ready to be sealed: its lines numbered, its canonical content put together.
 *
 * Invariant: what is hashed is exactly what is stored; the verifier builds the same content from the
 * stored rows through the same functions.
 */
import type { CanonicalEntry, CanonicalLine } from "./canonical";
import type { Line } from "./split";

export type Naming = {
  holderCode: (holderId: number) => string;
  materialCode: (materialId: number) => string;
  originCode: (originNo: number) => string;
};

export function canonicalLines(lines: readonly Line[], naming: Naming): CanonicalLine[] {
  return lines.map((line, index) => ({
    seq: index + 1,
    account: line.account,
    cause: line.cause,
    holder: line.holderId === null ? null : naming.holderCode(line.holderId),
    material: naming.materialCode(line.materialId),
    grams: line.grams,
    after: line.after,
    basis: line.basis,
    scaleNumber: line.scaleNumber,
    mpeMilligrams: line.mpeMilligrams,
    parts: line.parts,
  }));
}

/** "no:type:point" of every origin that the lines name, by number. */
export function originsIn(lines: readonly Line[], naming: Naming): string[] {
  const numbers = new Set<number>();
  for (const line of lines) for (const [no] of line.parts.O) numbers.add(no);
  return [...numbers].sort((a, b) => a - b).map(naming.originCode);
}

export function canonicalOf(
  entry: Omit<CanonicalEntry, "lines" | "origins">,
  lines: readonly Line[],
  naming: Naming,
): CanonicalEntry {
  return {
    id: entry.id,
    actId: entry.actId,
    kind: entry.kind,
    ruleVersion: entry.ruleVersion,
    occurredAt: entry.occurredAt,
    bookedDay: entry.bookedDay,
    concernsDay: entry.concernsDay,
    recordedAt: entry.recordedAt,
    doneBy: entry.doneBy,
    sentBy: entry.sentBy,
    device: entry.device,
    subject: entry.subject,
    reverses: entry.reverses,
    noteHash: entry.noteHash,
    lines: canonicalLines(lines, naming),
    origins: originsIn(lines, naming),
  };
}
