/** Writing what an act has decided: the entry's rows, and one write per changed balance, part and total. */
import "server-only";
import type { Day, Month } from "@/lib/core/time";
import { prepared, type Tx } from "@/lib/platform/database";
import type { canonicalOf } from "../rules/seal";
import type { Holding } from "../rules/holding";
import type { Line } from "../rules/split";
import { TOTALS, type ScaleDelta, type TotalsDelta } from "../rules/totals";
import { DIMENSIONS } from "../terms";

export type Touched = { holderId: number; materialId: number; before: Holding; now: Holding };

export const TOTALS_SQL: Record<(typeof TOTALS)[number], string> = {
  held: "held",
  collected: "collected",
  otherIn: "other_in",
  opening: "opening",
  disposed: "disposed",
  passedProven: "passed_proven",
  passedUnproven: "passed_unproven",
  loss: "loss",
  difference: "difference",
  pieces: "pieces",
  accepted: "accepted",
  rejected: "rejected",
  bags: "bags",
  beforeOpening: "before_opening",
};

export function insertEntry(
  tx: Tx,
  entry: ReturnType<typeof canonicalOf>,
  lines: readonly Line[],
  prevHash: string,
  hash: string,
): void {
  const insertLine = prepared(
    tx.client,
    `insert into lines (entry_id, seq, account, cause, holder_id, material_id, grams, after, basis, scale_id, mpe_mg)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  const insertPart = prepared(
    tx.client,
    "insert into line_parts (entry_id, seq, dim, key, grams) values (?, ?, ?, ?, ?)",
  );
  let partCount = 0;
  lines.forEach((line, index) => {
    const seq = index + 1;
    insertLine.run(
      entry.id,
      seq,
      line.account,
      line.cause,
      line.holderId,
      line.materialId,
      line.grams,
      line.after,
      line.basis,
      line.scaleNumber,
      line.mpeMilligrams,
    );
    for (const dim of DIMENSIONS) {
      for (const [key, grams] of line.parts[dim]) {
        insertPart.run(entry.id, seq, dim, key, grams);
        partCount += 1;
      }
    }
  });
  prepared(
    tx.client,
    `insert into entries (id, act_id, kind, rule_version, occurred_at, booked_day, concerns_day, recorded_at,
       done_by, sent_by, device, subject, reverses, note_hash, line_count, part_count, prev_hash, hash)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    entry.id,
    entry.actId,
    entry.kind,
    entry.ruleVersion,
    entry.occurredAt,
    entry.bookedDay,
    entry.concernsDay,
    entry.recordedAt,
    entry.doneBy,
    entry.sentBy,
    entry.device,
    entry.subject,
    entry.reverses,
    entry.noteHash,
    lines.length,
    partCount,
    prevHash,
    hash,
  );
}

/** Made once: every act of weighing uses both. */
function addTotalsSql(table: "totals_day" | "totals_month", key: "day" | "month"): string {
  const columns = TOTALS.map((column) => TOTALS_SQL[column]);
  return `insert into ${table} (${key}, row_id, origin_no, ${columns.join(", ")})
     values (?, ?, ?, ${columns.map(() => "?").join(", ")})
     on conflict do update set ${columns.map((name) => `${name} = ${name} + excluded.${name}`).join(", ")}`;
}

const ADD_TOTALS = {
  day: addTotalsSql("totals_day", "day"),
  month: addTotalsSql("totals_month", "month"),
};

/** @param when the day or the month that the delta belongs to */
export function addTotals(
  tx: Tx,
  key: "day" | "month",
  when: Day | Month,
  delta: TotalsDelta,
): void {
  prepared(tx.client, ADD_TOTALS[key]).run(
    when,
    delta.rowId,
    delta.originNo,
    ...TOTALS.map((column) => delta.totals[column]),
  );
}

export function addScaleTotals(tx: Tx, month: Month, delta: ScaleDelta): void {
  prepared(
    tx.client,
    `insert into totals_scale (month, measure, basis, scale_id, grams, mpe_mg) values (?, ?, ?, ?, ?, ?)
     on conflict do update set grams = grams + excluded.grams, mpe_mg = mpe_mg + excluded.mpe_mg`,
  ).run(month, delta.measure, delta.basis, delta.scaleNumber, delta.grams, delta.mpeMilligrams);
}

export function writeHolding(tx: Tx, { holderId, materialId, before, now }: Touched): void {
  prepared(
    tx.client,
    `insert into balances (holder_id, material_id, grams) values (?, ?, ?)
     on conflict do update set grams = excluded.grams`,
  ).run(holderId, materialId, now.grams);
  const put = prepared(
    tx.client,
    `insert into parts (holder_id, material_id, dim, key, grams) values (?, ?, ?, ?, ?)
     on conflict do update set grams = excluded.grams`,
  );
  const remove = prepared(
    tx.client,
    "delete from parts where holder_id = ? and material_id = ? and dim = ? and key = ?",
  );
  for (const dim of DIMENSIONS) {
    for (const [key, grams] of now[dim]) {
      if (before[dim].get(key) !== grams) put.run(holderId, materialId, dim, key, grams);
    }
    for (const key of before[dim].keys()) {
      if (!now[dim].has(key)) remove.run(holderId, materialId, dim, key);
    }
  }
}
