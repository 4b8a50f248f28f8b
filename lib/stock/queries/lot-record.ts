/** One lot as stored: what commands of this and of later areas need to know of it. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { heldBy } from "@/lib/ledger/queries/entries";
import { prepared, type Readable } from "@/lib/platform/database";
import type { StepMaterial } from "../rules/steps";
import type { LotEnd } from "../terms";

export type LotRecord = StepMaterial & {
  lotId: LotId;
  number: number;
  /** The ledger's holder of this lot. */
  holderId: number;
  materialId: number;
  place: string;
  openedAt: Instant;
  closedAt: Instant | null;
  closedFor: LotEnd | null;
  containerId: Id<"container"> | null;
};

const RECORD = `
  select l.id as lotId, l.number, l.holder_id as holderId, l.material_id as materialId, l.place,
         l.opened_at as openedAt, l.closed_at as closedAt, l.closed_for as closedFor,
         l.container_id as containerId, r.polymer, r.kind, r.colour_code as colourCode, m.form, m.wash
    from lots l join materials m on m.id = l.material_id join rows r on r.id = m.row_id`;

export function getLotRecord(db: Readable, number: number): LotRecord | null {
  const row = prepared(db.client, `${RECORD} where l.number = ?`).get(number);
  return (row as LotRecord | undefined) ?? null;
}

/** A lot that a record names: it is there, because lots are never removed. */
export function lotOf(db: Readable, lotId: LotId): LotRecord {
  const row = prepared(db.client, `${RECORD} where l.id = ?`).get(lotId) as LotRecord | undefined;
  if (!row) throw new Error(`no lot ${lotId}`);
  return row;
}

/**
 * @param path null for a lot in the address: then it is not found; else the field that names it
 * @throws AppError `not-found` or `unknown-lot`
 */
export function requireLot(
  db: Readable,
  number: number,
  path: readonly (string | number)[] | null = null,
): LotRecord {
  const lot = getLotRecord(db, number);
  if (lot) return lot;
  throw path === null ? new AppError("not-found") : new AppError("unknown-lot", { number }, path);
}

/** What the book holds in a lot, in grams. */
export function bookGrams(db: Readable, lot: Pick<LotRecord, "holderId" | "materialId">): number {
  return heldBy(db, lot.holderId, lot.materialId);
}

/** Number of the last entry that touched a lot (0: none), and its last count. */
export function lastSeen(
  db: Readable,
  lot: Pick<LotRecord, "lotId" | "holderId">,
): { entryId: number; countId: Id<"count"> | null } {
  const entryId = prepared(
    db.client,
    "select entry_id from lines where holder_id = ? order by entry_id desc limit 1",
  )
    .pluck()
    .get(lot.holderId) as number | undefined;
  const countId = prepared(
    db.client,
    "select id from counts where lot_id = ? order by recorded_at desc, id desc limit 1",
  )
    .pluck()
    .get(lot.lotId) as Id<"count"> | undefined;
  return { entryId: entryId ?? 0, countId: countId ?? null };
}

/** A person's name for a sentence; one who was erased has none. */
export function personName(db: Readable, id: string): string {
  const name = prepared(db.client, "select name from people where id = ?").pluck().get(id) as
    string | undefined;
  return name ? name : "somebody who has left";
}
