/**
 * From a draft to lines with both compositions (rule version 1; ledger.md, "Splitting").
 *
 * Invariant: the lines of an entry sum to zero, each line equals its parts by origin and its parts by
 * times heated, and what leaves takes every part in proportion by largest remainder over what is left of
 * the pool, so that no part goes negative and everything closes both ways.
 *
 * The pool is split by material first and inside a material by key, each dimension alone: lines outside
 * the shed stand in the row they left, and both dimensions must agree how much left each row.
 */
import { DIMENSIONS, PHYSICAL, type Account, type Basis, type EntryKind } from "../terms";
import { addTo, negated, type Composition, type Holding } from "./holding";
import {
  byMaterial,
  inProportion,
  joined,
  poolOf,
  takeFromPool,
  type Pool,
  type Taken,
} from "./pool";

type Reading = { basis?: Basis | null; scaleNumber?: number | null; mpeMilligrams?: number | null };

/** Plastic that enters the book; grams below zero, the origin is known. */
export type EnteringLine = {
  account: "source" | "opening" | "before-opening";
  originNo: number;
  materialId: number;
  grams: number;
} & Reading;
/**
 * Into (above zero) or out of (below zero) a holder. Pieces of a blend become a line for each row that they
 * left, whatever material their draft names.
 */
export type HolderLine = {
  account: "bag" | "lot" | "run" | "reject-bin" | "pieces";
  holderId: number;
  materialId: number;
  grams: number;
} & Reading;
/** Out of the shed; below zero it is a gain (more was found than the book held). */
export type OutsideLine = {
  account: "loss" | "difference" | "disposed" | "passed-on" | "before-opening";
  cause?: string;
  grams: number;
  /** Only for what comes back from outside with its parts known, such as a receipt; parts below zero. */
  from?: { materialId: number; parts: Composition };
} & Reading;
export type DraftLine = EnteringLine | HolderLine | OutsideLine;

export type Line = {
  account: Account;
  cause: string | null;
  holderId: number | null;
  materialId: number;
  grams: number;
  /** The holder's grams of that material once this line is in; null outside a holder. */
  after: number | null;
  basis: Basis | null;
  scaleNumber: number | null;
  mpeMilligrams: number | null;
  parts: Composition;
};

/** Gives the holding of a holder as it stands at this moment of the act; split() changes it. */
export type Holdings = (holderId: number, materialId: number) => Holding;

const OUT_ORDER: readonly Account[] = [
  "pieces",
  "lot",
  "bag",
  "run",
  "reject-bin",
  "before-opening",
  "passed-on",
  "disposed",
  "loss",
  "difference",
];

export function isHolderLine(line: DraftLine): line is HolderLine {
  return (PHYSICAL as readonly string[]).includes(line.account);
}

/** Accounts outside the shed that a draft may name without an origin. */
export function isOutside(account: Account): account is OutsideLine["account"] {
  return (
    account === "loss" ||
    account === "difference" ||
    account === "disposed" ||
    account === "passed-on" ||
    account === "before-opening"
  );
}

function isEntering(line: DraftLine): line is EnteringLine {
  return "originNo" in line;
}

/** Outputs in the order in which they are split: by account, lots and the like by holder. */
export function outputOrder<
  T extends { account: Account; holderId?: number | null; cause?: string | null },
>(outputs: readonly T[]): T[] {
  return [...outputs].sort(
    (a, b) =>
      OUT_ORDER.indexOf(a.account) - OUT_ORDER.indexOf(b.account) ||
      (a.holderId ?? 0) - (b.holderId ?? 0) ||
      (a.cause ?? "").localeCompare(b.cause ?? "", "en"),
  );
}

/** @throws RangeError when the draft cannot be an entry: a programming mistake, never a person's */
function check(lines: readonly DraftLine[]): void {
  let sum = 0;
  const outside = new Set<string>();
  for (const line of lines) {
    if (!Number.isSafeInteger(line.grams) || line.grams === 0) {
      throw new RangeError(`a line of ${line.grams} g`);
    }
    if (isEntering(line) && line.grams > 0) throw new RangeError(`${line.account} above zero`);
    if (!isHolderLine(line) && !isEntering(line)) {
      const name = `${line.account}/${line.cause ?? ""}/${line.grams < 0 ? "in" : "out"}`;
      if (outside.has(name)) throw new RangeError(`two lines of ${name} in one draft`);
      outside.add(name);
    }
    sum += line.grams;
  }
  if (lines.length < 2 || sum !== 0) throw new RangeError(`a draft that sums to ${sum} g`);
}

function finished(line: DraftLine, materialId: number, grams: number, parts: Composition): Line {
  return {
    account: line.account,
    cause: "cause" in line ? (line.cause ?? null) : null,
    holderId: isHolderLine(line) ? line.holderId : null,
    materialId,
    grams,
    after: null,
    basis: line.basis ?? null,
    scaleNumber: line.scaleNumber ?? null,
    mpeMilligrams: line.mpeMilligrams ?? null,
    parts,
  };
}

/** Puts a line into its holder and notes what the holder has then. */
export function applyLine(line: Line, holdings: Holdings): void {
  if (line.holderId === null) return;
  const holding = holdings(line.holderId, line.materialId);
  addTo(holding, line.grams, line.parts);
  line.after = holding.grams;
}

/** The exact negative of stored lines, as a reversing entry has them. */
export function reversed(lines: readonly Line[]): Line[] {
  return lines.map((line) => ({
    ...line,
    grams: -line.grams,
    parts: minus(line.parts),
    after: null,
  }));
}

const minus = (parts: Composition): Composition => ({ O: negated(parts.O), H: negated(parts.H) });

/**
 * Splits a draft and applies it to the holdings.
 *
 * @param kind "finish" adds one heating to whatever a run gives out; what was not used goes back before it
 *   by an entry of kind "return", which adds none
 * @param draft lines in whole grams, summing to zero
 * @param holdings as they stand; changed by what the lines move
 * @returns lines in the order in which they are numbered: what is taken, what enters, gains, outputs
 * @throws RangeError for a draft that is no entry
 */
export function split(kind: EntryKind, draft: readonly DraftLine[], holdings: Holdings): Line[] {
  check(draft);
  const pool: Pool = new Map();
  const lines: Line[] = [];
  const put = (line: Line): void => {
    lines.push(line);
    if (line.grams < 0) addTo(poolOf(pool, line.materialId), -line.grams, minus(line.parts));
    applyLine(line, holdings);
  };

  const takes = draft.filter((line): line is HolderLine => isHolderLine(line) && line.grams < 0);
  for (const line of takes) {
    const parts = inProportion(-line.grams, holdings(line.holderId, line.materialId));
    put(finished(line, line.materialId, line.grams, minus(parts)));
  }
  for (const line of draft) {
    if (isEntering(line)) {
      const parts: Composition = { O: [[line.originNo, line.grams]], H: [[0, line.grams]] };
      put(finished(line, line.materialId, line.grams, parts));
    } else if (!isHolderLine(line) && line.grams < 0 && line.from) {
      put(finished(line, line.from.materialId, line.grams, line.from.parts));
    }
  }
  for (const line of draft) {
    if (isHolderLine(line) || isEntering(line) || line.grams > 0 || line.from) continue;
    gainsOf(-line.grams, takes, pool, draft, holdings).forEach((gain, index) => {
      put(finished(countedOnce(line, index), gain.materialId, -gain.grams, minus(gain.parts)));
    });
  }

  const fromRun = takes.some((line) => line.account === "run");
  const heats = kind === "finish" && fromRun;
  const outputs = outputOrder(draft.filter((line) => line.grams > 0));
  for (const line of outputs) {
    if (isEntering(line)) continue;
    // What goes into a run keeps its row, and so does what a run gives back to a lot of what was drawn.
    const keepsRow = line.account === "run" || (fromRun && line.account === "lot");
    const taken = takeFromPool(pool, line.grams, keepsRow ? line.materialId : null);
    if (isHolderLine(line) && line.account !== "pieces") {
      put(finished(line, line.materialId, line.grams, joined(taken, heats)));
      continue;
    }
    // Pieces, and whatever leaves the shed, stand in the rows that they left: a line for each.
    taken.forEach((piece, index) => {
      const parts = joined([piece], heats);
      put(finished(countedOnce(line, index), piece.materialId, piece.grams, parts));
    });
  }
  return lines;
}

/**
 * A gain enters in the holder's own proportion: of what was taken, or, when nothing was, of the one holder
 * that receives it.
 */
function gainsOf(
  grams: number,
  takes: readonly HolderLine[],
  pool: Pool,
  draft: readonly DraftLine[],
  holdings: Holdings,
): Taken[] {
  if (takes.length > 0) {
    return byMaterial(pool, grams).map(([materialId, part]) => ({
      materialId,
      grams: part,
      parts: inProportion(part, poolOf(pool, materialId)),
    }));
  }
  const into = draft.filter((line): line is HolderLine => isHolderLine(line) && line.grams > 0);
  const receiver = into[0];
  if (into.length !== 1 || !receiver)
    throw new RangeError("a gain needs one holder that it enters");
  return [
    {
      materialId: receiver.materialId,
      grams,
      parts: inProportion(grams, holdings(receiver.holderId, receiver.materialId)),
    },
  ];
}

/** One reading that became several lines (one a row) has its error in the first of them only. */
function countedOnce<L extends DraftLine>(line: L, index: number): L {
  return index === 0 ? line : { ...line, mpeMilligrams: null };
}

/** Every dimension of every line sums to its grams. */
export function partsAgree(line: Pick<Line, "grams" | "parts">): boolean {
  return DIMENSIONS.every(
    (dim) => line.parts[dim].reduce((sum, [, grams]) => sum + grams, 0) === line.grams,
  );
}
