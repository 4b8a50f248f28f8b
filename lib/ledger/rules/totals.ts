/**
 * What one entry adds to the totals of its day and month (ledger.md, "A report's row").
 *
 * Invariant: totals are a pure sum over lines; rebuilding them from all lines gives the same numbers.
 */
import type { Basis, EntryKind, Measure, OriginType } from "../terms";
import { IN_THE_SHED, REJECT, UNSORTED } from "../terms";
import { addTo, emptyHolding, negated, type Holding, type Parts } from "./holding";
import { takeFromPool } from "./pool";
import type { Line } from "./split";

export const TOTALS = [
  "held",
  "collected",
  "otherIn",
  "opening",
  "disposed",
  "passedProven",
  "passedUnproven",
  "loss",
  "difference",
  "pieces",
  "accepted",
  "rejected",
  "bags",
  "beforeOpening",
] as const;
export type TotalsColumn = (typeof TOTALS)[number];
export type Totals = Record<TotalsColumn, number>;

export function zeroTotals(): Totals {
  return Object.fromEntries(TOTALS.map((column) => [column, 0])) as Totals;
}

export type TotalsDelta = { rowId: number; originNo: number; totals: Totals };
export type ScaleDelta = {
  measure: Measure;
  basis: Basis;
  scaleNumber: number;
  grams: number;
  mpeMilligrams: number;
};

export type Lookups = {
  rowOf: (materialId: number) => number;
  originType: (originNo: number) => OriginType;
};

const SHED: readonly string[] = IN_THE_SHED;

/** The column that a line's grams go to, and with which sign; null for the shed's own accounts. */
function columnOf(
  line: Line,
  originType: OriginType,
): { column: TotalsColumn; sign: 1 | -1 } | null {
  switch (line.account) {
    case "source":
      return { column: originType === "donated" ? "collected" : "otherIn", sign: -1 };
    case "opening":
      return { column: "opening", sign: -1 };
    case "before-opening":
      return { column: "beforeOpening", sign: 1 };
    case "passed-on":
      return { column: line.cause === "proven" ? "passedProven" : "passedUnproven", sign: 1 };
    case "disposed":
    case "loss":
    case "difference":
    case "pieces":
      return { column: line.account, sign: 1 };
    default:
      return null;
  }
}

/** Of what went to the reject bin: from which material, by origin. Replays the split of a stored entry. */
function rejectedByMaterial(lines: readonly Line[]): { materialId: number; parts: Parts }[] {
  const pool = new Map<number, Holding>();
  const found: { materialId: number; parts: Parts }[] = [];
  for (const line of lines) {
    if (line.grams > 0) continue;
    const left = pool.get(line.materialId) ?? emptyHolding();
    pool.set(line.materialId, left);
    addTo(left, -line.grams, { O: negated(line.parts.O), H: negated(line.parts.H) });
  }
  for (const line of lines) {
    if (line.grams < 0) continue;
    const outside = line.holderId === null;
    const taken = outside
      ? takeFromPool(
          new Map([[line.materialId, pool.get(line.materialId) ?? emptyHolding()]]),
          line.grams,
          null,
        )
      : takeFromPool(pool, line.grams, null);
    if (line.account !== "reject-bin") continue;
    for (const piece of taken) found.push({ materialId: piece.materialId, parts: piece.parts.O });
  }
  return found;
}

/**
 * @param kind the entry's kind; for a reversal the kind of what it reverses
 * @param lines the entry's lines; for a reversal those of what it reverses
 * @param sign -1 for a reversal
 */
export function totalsOf(
  kind: EntryKind,
  lines: readonly Line[],
  sign: 1 | -1,
  lookups: Lookups,
): TotalsDelta[] {
  const found = new Map<string, TotalsDelta>();
  const at = (rowId: number, originNo: number): Totals => {
    const key = `${rowId}:${originNo}`;
    let delta = found.get(key);
    if (!delta) {
      delta = { rowId, originNo, totals: zeroTotals() };
      found.set(key, delta);
    }
    return delta.totals;
  };
  const has = (account: Line["account"]): boolean => lines.some((line) => line.account === account);
  const sorts = kind !== "settling" && has("bag") && has("lot");
  const rejects = kind !== "settling" && (has("bag") || has("lot")) && !has("run");

  for (const line of lines) {
    const rowId = lookups.rowOf(line.materialId);
    for (const [originNo, grams] of line.parts.O) {
      const totals = at(rowId, originNo);
      if (SHED.includes(line.account)) totals.held += sign * grams;
      const target = columnOf(line, lookups.originType(originNo));
      if (target) totals[target.column] += sign * target.sign * grams;
      if (sorts && line.account === "lot") totals.accepted += sign * grams;
      if (rejects && line.account === "reject-bin") at(REJECT, originNo).rejected += sign * grams;
    }
  }
  if (rejects && !has("bag") && has("reject-bin")) {
    for (const { materialId, parts } of rejectedByMaterial(lines)) {
      for (const [originNo, grams] of parts) {
        at(lookups.rowOf(materialId), originNo).accepted -= sign * grams;
      }
    }
  }
  if (kind === "weigh-in") {
    const origin = lines.find((line) => line.account === "source")?.parts.O[0]?.[0];
    if (origin !== undefined) at(UNSORTED, origin).bags += sign;
  }
  return [...found.values()].sort((a, b) => a.rowId - b.rowId || a.originNo - b.originNo);
}

function measureOf(line: Line, sorts: boolean, counts: boolean, lookups: Lookups): Measure | null {
  switch (line.account) {
    case "source": {
      const origin = line.parts.O[0]?.[0] ?? 0;
      return lookups.originType(origin) === "donated" ? "collected" : "other-in";
    }
    case "opening":
      return "opening";
    case "lot":
      return sorts ? "accepted" : counts ? "counted" : null;
    case "reject-bin":
      return "rejected";
    case "disposed":
    case "passed-on":
    case "pieces":
      return line.account;
    default:
      return null;
  }
}

/** What an entry adds to the month's kilograms by basis and scale. Arguments as for {@link totalsOf}. */
export function scaleTotalsOf(
  kind: EntryKind,
  lines: readonly Line[],
  sign: 1 | -1,
  lookups: Lookups,
): ScaleDelta[] {
  const found = new Map<string, ScaleDelta>();
  const sorts = lines.some((line) => line.account === "bag");
  for (const line of lines) {
    if (line.basis === null) continue;
    const measure = measureOf(line, sorts, kind === "count", lookups);
    if (!measure) continue;
    const scaleNumber = line.scaleNumber ?? 0;
    const key = `${measure}:${line.basis}:${scaleNumber}`;
    const delta = found.get(key) ?? {
      measure,
      basis: line.basis,
      scaleNumber,
      grams: 0,
      mpeMilligrams: 0,
    };
    const entering = line.account === "source" || line.account === "opening";
    delta.grams += sign * (entering ? -line.grams : line.grams);
    delta.mpeMilligrams += sign * (line.mpeMilligrams ?? 0);
    found.set(key, delta);
  }
  return [...found.values()];
}
