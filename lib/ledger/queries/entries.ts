/** Reads of the ledger that several areas and the ledger's own commands need. */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import type { Day, Instant } from "@/lib/core/time";
import { emptyHolding, type Composition, type Holding } from "../rules/holding";
import type { Line } from "../rules/split";
import type { Dimension, EntryKind } from "../terms";

export type LedgerHead = { entryId: number; hash: string };

/** Number and hash of the last entry; 0 and "" for an empty ledger. */
export function ledgerHead(db: Readable): LedgerHead {
  return (
    (prepared(
      db.client,
      "select id as entryId, hash from entries order by id desc limit 1",
    ).get() as LedgerHead | undefined) ?? { entryId: 0, hash: "" }
  );
}

/** Grams of one material in one holder. */
export function heldBy(db: Readable, holderId: number, materialId: number): number {
  return (
    (
      prepared(db.client, "select grams from balances where holder_id = ? and material_id = ?").get(
        holderId,
        materialId,
      ) as { grams: number } | undefined
    )?.grams ?? 0
  );
}

/** What a holder has of a material, with both compositions; a fresh object. */
export function loadHolding(db: Readable, holderId: number, materialId: number): Holding {
  const holding = emptyHolding();
  holding.grams = heldBy(db, holderId, materialId);
  const parts = prepared(
    db.client,
    "select dim, key, grams from parts where holder_id = ? and material_id = ?",
  ).all(holderId, materialId) as { dim: Dimension; key: number; grams: number }[];
  for (const part of parts) holding[part.dim].set(part.key, part.grams);
  return holding;
}

/** Did a later entry, not one that takes something back, take from what an act filled? */
export function takenSince(db: Readable, actId: number): boolean {
  return (
    prepared(
      db.client,
      `select 1 from lines filled
       join lines later on later.holder_id = filled.holder_id and later.material_id = filled.material_id
       join entries e on e.id = later.entry_id
       where filled.entry_id in (select id from entries where act_id = ?)
         and filled.holder_id is not null and filled.grams > 0
         and later.entry_id > (select max(id) from entries where act_id = ?)
         and later.grams < 0 and e.kind <> 'reversal'
       limit 1`,
    ).get(actId, actId) !== undefined
  );
}

export type StoredEntry = {
  id: number;
  actId: number;
  kind: EntryKind;
  ruleVersion: number;
  occurredAt: Instant;
  bookedDay: Day;
  concernsDay: Day | null;
  recordedAt: Instant;
  doneBy: string;
  sentBy: string;
  device: string | null;
  subject: string;
  reverses: number | null;
  noteHash: string | null;
  lineCount: number;
  partCount: number;
  prevHash: string;
  hash: string;
};

const ENTRY_COLUMNS = `id, act_id as actId, kind, rule_version as ruleVersion, occurred_at as occurredAt,
  booked_day as bookedDay, concerns_day as concernsDay, recorded_at as recordedAt, done_by as doneBy,
  sent_by as sentBy, device, subject, reverses, note_hash as noteHash, line_count as lineCount,
  part_count as partCount, prev_hash as prevHash, hash`;

export function getEntry(db: Readable, id: number): StoredEntry | null {
  return (
    (prepared(db.client, `select ${ENTRY_COLUMNS} from entries where id = ?`).get(id) as
      StoredEntry | undefined) ?? null
  );
}

/** Entries after a number, in order; a page of at most `limit`, so that no read runs long. */
export function listEntriesAfter(db: Readable, afterId: number, limit: number): StoredEntry[] {
  return prepared(
    db.client,
    `select ${ENTRY_COLUMNS} from entries where id > ? order by id limit ?`,
  ).all(afterId, limit) as StoredEntry[];
}

/** Entries of an act in order. */
export function listActEntries(db: Readable, actId: number): StoredEntry[] {
  return prepared(
    db.client,
    `select ${ENTRY_COLUMNS} from entries where act_id = ? order by id`,
  ).all(actId) as StoredEntry[];
}

/** Number of the entry that reverses this one, or null. */
export function reversalOf(db: Readable, entryId: number): number | null {
  return (
    (
      prepared(db.client, "select id from entries where reverses = ?").get(entryId) as
        { id: number } | undefined
    )?.id ?? null
  );
}

type StoredLine = Omit<Line, "parts"> & { seq: number };

/** An entry's lines with their parts, in order. */
export function loadLines(db: Readable, entryId: number): (Line & { seq: number })[] {
  const lines = prepared(
    db.client,
    `select seq, account, cause, holder_id as holderId, material_id as materialId, grams, after, basis,
       scale_id as scaleNumber, mpe_mg as mpeMilligrams from lines where entry_id = ? order by seq`,
  ).all(entryId) as StoredLine[];
  const parts = prepared(
    db.client,
    "select seq, dim, key, grams from line_parts where entry_id = ? order by seq, dim, key",
  ).all(entryId) as { seq: number; dim: Dimension; key: number; grams: number }[];
  const bySeq = new Map<number, Record<Dimension, [number, number][]>>();
  for (const part of parts) {
    let own = bySeq.get(part.seq);
    if (!own) {
      own = { O: [], H: [] };
      bySeq.set(part.seq, own);
    }
    own[part.dim].push([part.key, part.grams]);
  }
  return lines.map((line) => ({
    ...line,
    parts: (bySeq.get(line.seq) ?? { O: [], H: [] }) satisfies Composition,
  }));
}
