/**
 * The verifier: replays the ledger in order and stops at the first entry that is not as the rules have it.
 *
 * Invariant checked: every entry follows the hash of the one before and has its own right; its lines sum
 * to zero and equal their parts; its splits are those of its rule version; an act leaves no holder short;
 * a reversal is the exact negative of what it names. Balances, parts and totals are rebuilt on the way.
 */
import type { Account, EntryKind, OriginType } from "../terms";
import { canonicalText } from "./canonical";
import { emptyHolding, holdingKey, isSound, partsOf, type Holding } from "./holding";
import { canonicalOf, type Naming } from "./seal";
import { settlingLines } from "./settle";
import {
  isOutside,
  partsAgree,
  reversed,
  applyLine,
  split,
  type DraftLine,
  type Line,
} from "./split";
import {
  scaleTotalsOf,
  TOTALS,
  totalsOf,
  zeroTotals,
  type ScaleDelta,
  type Totals,
} from "./totals";

export type VerifyEntry = {
  id: number;
  actId: number;
  kind: EntryKind;
  ruleVersion: number;
  occurredAt: number;
  bookedDay: string;
  concernsDay: string | null;
  recordedAt: number;
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

export type VerifyNaming = Naming & {
  rowOf: (materialId: number) => number;
  originType: (originNo: number) => OriginType;
};

/** What is needed from outside the pure rules. */
export type VerifySource = {
  naming: VerifyNaming;
  sha256: (before: string, text: string) => string;
  /** An earlier entry with its lines, or null. */
  earlier: (entryId: number) => { entry: VerifyEntry; lines: Line[] } | null;
};

export type Rebuilt = {
  holdings: Map<string, Holding>;
  day: Map<string, Totals>;
  month: Map<string, Totals>;
  scale: Map<string, Omit<ScaleDelta, "measure" | "basis" | "scaleNumber">>;
};

export type Verifier = {
  /** @returns what is wrong with the entry, or null */
  take: (entry: VerifyEntry, lines: Line[]) => string | null;
  /** @returns what is wrong with the last act, or null */
  finish: () => string | null;
  rebuilt: Rebuilt;
};

/** A draft that would give these lines: rows of one output joined again, parts left out. */
function draftOf(lines: readonly Line[]): DraftLine[] {
  const draft: DraftLine[] = [];
  const outside = new Map<string, { index: number }>();
  for (const line of lines) {
    const reading = {
      basis: line.basis,
      scaleNumber: line.scaleNumber,
      mpeMilligrams: line.mpeMilligrams,
    };
    const { account, materialId, grams } = line;
    const pieces = account === "pieces" && grams > 0 ? `pieces/${line.holderId}` : null;
    const seen = pieces === null ? undefined : outside.get(pieces);
    const first = seen && draft[seen.index];
    if (seen && first) {
      draft[seen.index] = { ...first, grams: first.grams + grams };
    } else if (line.holderId !== null) {
      if (pieces !== null) outside.set(pieces, { index: draft.length });
      draft.push({
        account: account as "lot",
        holderId: line.holderId,
        materialId,
        grams,
        ...reading,
      });
    } else if (
      grams < 0 &&
      (account === "source" || account === "opening" || account === "before-opening")
    ) {
      draft.push({ account, originNo: line.parts.O[0]?.[0] ?? 0, materialId, grams, ...reading });
    } else if (isOutside(account)) {
      const cause = line.cause === null ? {} : { cause: line.cause };
      if (grams < 0 && (account === "disposed" || account === "passed-on")) {
        draft.push({
          account,
          ...cause,
          grams,
          from: { materialId, parts: line.parts },
          ...reading,
        });
        continue;
      }
      const name = `${account}/${line.cause ?? ""}/${grams < 0 ? "in" : "out"}`;
      const known = outside.get(name);
      const before = known ? draft[known.index] : undefined;
      if (known && before) {
        draft[known.index] = { ...before, grams: before.grams + grams };
      } else {
        outside.set(name, { index: draft.length });
        draft.push({ account, ...cause, grams, ...reading });
      }
    }
  }
  return draft;
}

const plain = (lines: readonly Line[]): string =>
  JSON.stringify(
    lines.map((line) => [
      line.account,
      line.cause,
      line.holderId,
      line.materialId,
      line.grams,
      line.after,
      line.basis,
      line.scaleNumber,
      line.mpeMilligrams,
      line.parts.O,
      line.parts.H,
    ]),
  );

export function newVerifier(source: VerifySource): Verifier {
  const rebuilt: Rebuilt = {
    holdings: new Map(),
    day: new Map(),
    month: new Map(),
    scale: new Map(),
  };
  let last = { id: 0, hash: "" };
  let act = 0;
  let touched = new Map<string, { account: Account; holderId: number; materialId: number }>();
  const reversedAlready = new Set<number>();

  const holdings = (holderId: number, materialId: number): Holding => {
    const key = holdingKey(holderId, materialId);
    let found = rebuilt.holdings.get(key);
    if (!found) {
      found = emptyHolding();
      rebuilt.holdings.set(key, found);
    }
    return found;
  };

  const actEnds = (): string | null => {
    for (const [key] of touched) {
      const holding = rebuilt.holdings.get(key);
      if (holding && !isSound(holding)) return "its act leaves a holder below zero";
      if (holding && holding.grams === 0 && holding.O.size === 0 && holding.H.size === 0) {
        rebuilt.holdings.delete(key);
      }
    }
    touched = new Map();
    return null;
  };

  /** What the rules give for this entry, applied to the rebuilt holdings. */
  const expected = (
    entry: VerifyEntry,
    lines: Line[],
  ): { lines: Line[]; counts: Counts } | string => {
    if (entry.kind === "reversal") {
      const original = entry.reverses === null ? null : source.earlier(entry.reverses);
      if (!original || original.entry.id >= entry.id)
        return "it reverses an entry that is not there";
      if (original.entry.kind === "reversal") return "it reverses a reversal";
      if (reversedAlready.has(original.entry.id)) return "its entry was reversed before";
      reversedAlready.add(original.entry.id);
      const back = reversed(original.lines);
      for (const line of back) applyLine(line, holdings);
      return {
        lines: back,
        counts: { kind: original.entry.kind, lines: original.lines, sign: -1 },
      };
    }
    if (entry.kind === "settling") {
      const settling = settlingLines(
        [...touched.values()].map((short) => ({
          ...short,
          holding: holdings(short.holderId, short.materialId),
        })),
      );
      return { lines: settling, counts: { kind: "settling", lines: settling, sign: 1 } };
    }
    try {
      const made = split(entry.kind, draftOf(lines), holdings);
      return { lines: made, counts: { kind: entry.kind, lines: made, sign: 1 } };
    } catch (error) {
      return `its lines are no entry (${error instanceof Error ? error.message : String(error)})`;
    }
  };

  return {
    rebuilt,
    take(entry, lines) {
      if (entry.id !== last.id + 1) return `entry ${last.id + 1} is missing`;
      if (entry.prevHash !== last.hash) return "it does not follow the hash of the entry before";
      const text = canonicalText(canonicalOf(entry, lines, source.naming));
      if (source.sha256(entry.prevHash, text) !== entry.hash)
        return "its content does not have its hash";
      if (lines.length !== entry.lineCount) return "its count of lines is wrong";
      if (lines.reduce((sum, line) => sum + line.grams, 0) !== 0)
        return "its lines do not sum to zero";
      if (!lines.every(partsAgree)) return "a line does not equal its parts";
      const partCount = lines.reduce(
        (sum, line) => sum + line.parts.O.length + line.parts.H.length,
        0,
      );
      if (partCount !== entry.partCount) return "its count of parts is wrong";
      if (entry.actId === entry.id) {
        const problem = actEnds();
        if (problem) return `entry ${last.id}: ${problem}`;
        act = entry.id;
      } else if (entry.actId !== act) return "it names another act";
      if (entry.ruleVersion !== 1) return `rule version ${entry.ruleVersion} is not known`;

      const made = expected(entry, lines);
      if (typeof made === "string") return made;
      if (plain(made.lines) !== plain(lines)) return "its splits are not those of the rules";
      for (const line of lines) {
        if (line.holderId === null) continue;
        touched.set(holdingKey(line.holderId, line.materialId), {
          account: line.account,
          holderId: line.holderId,
          materialId: line.materialId,
        });
      }
      count(rebuilt, entry.bookedDay, made.counts, source.naming);
      last = { id: entry.id, hash: entry.hash };
      return null;
    },
    finish: () => actEnds(),
  };
}

type Counts = { kind: EntryKind; lines: readonly Line[]; sign: 1 | -1 };

function count(rebuilt: Rebuilt, day: string, counts: Counts, naming: VerifyNaming): void {
  const month = day.slice(0, 7);
  for (const delta of totalsOf(counts.kind, counts.lines, counts.sign, naming)) {
    for (const [map, when] of [
      [rebuilt.day, day],
      [rebuilt.month, month],
    ] as const) {
      const key = `${when}:${delta.rowId}:${delta.originNo}`;
      const totals = map.get(key) ?? zeroTotals();
      for (const column of TOTALS) totals[column] += delta.totals[column];
      map.set(key, totals);
    }
  }
  for (const delta of scaleTotalsOf(counts.kind, counts.lines, counts.sign, naming)) {
    const key = `${month}:${delta.measure}:${delta.basis}:${delta.scaleNumber}`;
    const sum = rebuilt.scale.get(key) ?? { grams: 0, mpeMilligrams: 0 };
    sum.grams += delta.grams;
    sum.mpeMilligrams += delta.mpeMilligrams;
    rebuilt.scale.set(key, sum);
  }
}

/** One holding as text, to compare a rebuilt one with a stored one. */
export function holdingText(holding: Holding): string {
  return JSON.stringify([holding.grams, partsOf(holding.O), partsOf(holding.H)]);
}
