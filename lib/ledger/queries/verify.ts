/**
 * Reads the whole ledger once, in order, through the verifier, then compares balances, parts and totals
 * with what was rebuilt. Runs on a connection of its own (a worker thread or the command line): it takes
 * seconds for a large ledger.
 */
import "server-only";
import { createHash } from "node:crypto";
import type { Readable } from "@/lib/platform/database";
import { prepared } from "@/lib/platform/database";
import { emptyHolding, holdingKey, type Holding } from "../rules/holding";
import { TOTALS } from "../rules/totals";
import { holdingText, newVerifier, type Rebuilt } from "../rules/verify";
import type { Dimension } from "../terms";
import { definitions } from "./definitions";
import { getEntry, ledgerHead, listEntriesAfter, loadLines } from "./entries";

export type VerifyResult = {
  ok: boolean;
  /** The first bad entry; null when all are good, or when a stored figure differs from its lines. */
  badEntry: number | null;
  problem: string | null;
  entries: number;
  lines: number;
  headEntry: number;
  headHash: string;
  milliseconds: number;
};

/** A head that was noted outside (mailed at a month's closing): the chain must still pass through it. */
export type ExpectedHead = { entryId: number; hash: string };

const PAGE = 500;

/**
 * @param expected optional head noted outside the database
 * @returns what was found; never throws for a bad ledger
 */
export function verifyLedger(db: Readable, expected?: ExpectedHead): VerifyResult {
  const started = performance.now();
  const naming = definitions(db);
  const verifier = newVerifier({
    naming,
    sha256: (before, text) => createHash("sha256").update(before).update(text).digest("hex"),
    earlier: (entryId) => {
      const entry = getEntry(db, entryId);
      return entry && { entry, lines: loadLines(db, entryId) };
    },
  });
  const head = ledgerHead(db);
  let lineCount = 0;
  let entryCount = 0;
  const result = (badEntry: number | null, problem: string | null): VerifyResult => ({
    ok: problem === null,
    badEntry,
    problem,
    entries: entryCount,
    lines: lineCount,
    headEntry: head.entryId,
    headHash: head.hash,
    milliseconds: Math.round(performance.now() - started),
  });

  for (let after = 0; ;) {
    const page = listEntriesAfter(db, after, PAGE);
    for (const entry of page) {
      const lines = loadLines(db, entry.id);
      const problem = verifier.take(entry, lines);
      if (problem) return result(entry.id, problem);
      if (expected?.entryId === entry.id && expected.hash !== entry.hash) {
        return result(entry.id, "its hash is not the one that was noted outside the database");
      }
      entryCount += 1;
      lineCount += lines.length;
    }
    const last = page.at(-1);
    if (!last || last.id >= head.entryId) break;
    after = last.id;
  }
  const unfinished = verifier.finish();
  if (unfinished) return result(head.entryId, unfinished);
  if (expected && expected.entryId > head.entryId) {
    return result(null, `entry ${expected.entryId}, noted outside the database, is not there`);
  }
  return result(null, orphans(db, head.entryId) ?? differences(db, verifier.rebuilt));
}

function orphans(db: Readable, head: number): string | null {
  const line = prepared(db.client, "select entry_id from lines where entry_id > ? limit 1").get(
    head,
  );
  const part = prepared(
    db.client,
    "select entry_id from line_parts where entry_id > ? limit 1",
  ).get(head);
  return line || part ? "there are lines of an entry that was never sealed" : null;
}

function differences(db: Readable, rebuilt: Rebuilt): string | null {
  return (
    differentHolding(db, rebuilt.holdings) ??
    differentTotals(db, "totals_day", "day", rebuilt.day) ??
    differentTotals(db, "totals_month", "month", rebuilt.month) ??
    differentScaleTotals(db, rebuilt.scale)
  );
}

function differentHolding(db: Readable, rebuilt: ReadonlyMap<string, Holding>): string | null {
  const stored = new Map<string, Holding>();
  const at = (holderId: number, materialId: number): Holding => {
    const key = holdingKey(holderId, materialId);
    const found = stored.get(key) ?? emptyHolding();
    stored.set(key, found);
    return found;
  };
  const balances = prepared(
    db.client,
    "select holder_id as holderId, material_id as materialId, grams from balances where grams <> 0",
  );
  for (const row of balances.iterate() as Iterable<{
    holderId: number;
    materialId: number;
    grams: number;
  }>) {
    at(row.holderId, row.materialId).grams = row.grams;
  }
  const parts = prepared(
    db.client,
    "select holder_id as holderId, material_id as materialId, dim, key, grams from parts",
  );
  for (const row of parts.iterate() as Iterable<{
    holderId: number;
    materialId: number;
    dim: Dimension;
    key: number;
    grams: number;
  }>) {
    at(row.holderId, row.materialId)[row.dim].set(row.key, row.grams);
  }
  for (const key of new Set([...stored.keys(), ...rebuilt.keys()])) {
    const wanted = holdingText(rebuilt.get(key) ?? emptyHolding());
    if (holdingText(stored.get(key) ?? emptyHolding()) !== wanted) {
      const [holder, material] = key.split(":");
      return `the stored balance of holder ${holder}, material ${material} is not what its lines say`;
    }
  }
  return null;
}

function differentTotals(
  db: Readable,
  table: "totals_day" | "totals_month",
  key: "day" | "month",
  rebuilt: Rebuilt["day"],
): string | null {
  let seen = 0;
  const rows = prepared(
    db.client,
    `select ${key} || ':' || row_id || ':' || origin_no as name, held, collected, other_in as otherIn, opening,
       disposed, passed_proven as passedProven, passed_unproven as passedUnproven, loss, difference, pieces,
       accepted, rejected, bags, before_opening as beforeOpening from ${table}`,
  );
  for (const row of rows.iterate() as Iterable<
    { name: string } & Record<(typeof TOTALS)[number], number>
  >) {
    const wanted = rebuilt.get(row.name);
    seen += 1;
    if (!wanted || TOTALS.some((column) => wanted[column] !== row[column])) {
      return `the stored total ${table} ${row.name} is not what its lines say`;
    }
  }
  return seen === rebuilt.size ? null : `${rebuilt.size - seen} rows of ${table} are missing`;
}

function differentScaleTotals(db: Readable, rebuilt: Rebuilt["scale"]): string | null {
  let seen = 0;
  const rows = prepared(
    db.client,
    `select month || ':' || measure || ':' || basis || ':' || scale_id as name, grams, mpe_mg as mpeMilligrams
     from totals_scale`,
  );
  for (const row of rows.iterate() as Iterable<{
    name: string;
    grams: number;
    mpeMilligrams: number;
  }>) {
    const wanted = rebuilt.get(row.name);
    seen += 1;
    if (wanted?.grams !== row.grams || wanted.mpeMilligrams !== row.mpeMilligrams) {
      return `the stored total totals_scale ${row.name} is not what its lines say`;
    }
  }
  return seen === rebuilt.size ? null : `${rebuilt.size - seen} rows of totals_scale are missing`;
}
