/**
 * The ledger's only writer. Everything that moves mass ends in {@link postAct}, {@link reverseAct} or
 * {@link correctAct}, inside the caller's transaction.
 *
 * An act is what is posted together: its deltas are summed first, what a correction leaves short is
 * settled, and then every changed balance, part and total is written once.
 */
import "server-only";
import { createHash } from "node:crypto";
import { AppError } from "@/lib/core/errors";
import { kgCell } from "@/lib/core/mass";
import {
  dayOf,
  firstDayOf,
  monthOf,
  nextMonth,
  type Day,
  type Instant,
  type Month,
} from "@/lib/core/time";
import { prepared, type Tx } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { definitions } from "../queries/definitions";
import { ledgerHead, listActEntries, loadHolding, loadLines, reversalOf } from "../queries/entries";
import { canonicalText } from "../rules/canonical";
import { copyHolding, holdingKey, isSound, type Holding } from "../rules/holding";
import { canonicalOf } from "../rules/seal";
import { settlingLines } from "../rules/settle";
import { applyLine, reversed, split, type DraftLine, type Line } from "../rules/split";
import { scaleTotalsOf, totalsOf } from "../rules/totals";
import { RULE_VERSION, type EntryKind } from "../terms";
import { addScaleTotals, addTotals, insertEntry, writeHolding, type Touched } from "./store";

export type ActMeta = { now: Instant; doneBy: string; sentBy: string; device: string | null };
export type Draft = {
  kind: EntryKind;
  occurredAt: Instant;
  /** The record that causes it: "weigh-in:<id>". */
  subject: string;
  note?: string;
  lines: readonly DraftLine[];
};
export type Posted = { actId: number; entryIds: number[] };
export type Reversing = { actId: number; subject: string; note?: string };

type ReadyEntry = {
  kind: EntryKind;
  occurredAt: Instant;
  subject: string;
  reverses: number | null;
  note: string | null;
  lines: Line[];
  /** What the totals count by: for a reversal the kind and lines of what it reverses. */
  totals: { kind: EntryKind; lines: readonly Line[]; sign: 1 | -1 };
};

/** The holdings that an act touches, each read once. */
function touching(tx: Tx) {
  const touched = new Map<string, Touched>();
  const holdings = (holderId: number, materialId: number): Holding => {
    const key = holdingKey(holderId, materialId);
    let found = touched.get(key);
    if (!found) {
      const before = loadHolding(tx, holderId, materialId);
      found = { holderId, materialId, before, now: copyHolding(before) };
      touched.set(key, found);
    }
    return found.now;
  };
  return { touched, holdings };
}

/** Posts one act of plain entries. @throws AppError `ledger-short` when a holder would go below zero */
export function postAct(tx: Tx, meta: ActMeta, drafts: readonly Draft[]): Posted {
  const act = touching(tx);
  const entries = drafts.map((draft) => drafted(draft, act.holdings));
  for (const short of act.touched.values()) {
    if (isSound(short.now)) continue;
    throw new AppError("ledger-short", {
      heldKg: kgCell(short.before.grams),
      wantedKg: kgCell(short.before.grams - short.now.grams),
    });
  }
  return write(tx, meta, entries, act.touched);
}

/**
 * Takes an act back: the exact negative of each of its entries, and a settling entry for what its holders
 * no longer have.
 *
 * @throws AppError `undone-already`, or `ledger-correction-of-reversal` for an act that only takes back
 */
export function reverseAct(tx: Tx, meta: ActMeta, act: Reversing): Posted {
  return correctAct(tx, meta, act, []);
}

/** Takes an act back and posts what should have stood there, as one act; it always goes through. */
export function correctAct(
  tx: Tx,
  meta: ActMeta,
  wrong: Reversing,
  replacement: readonly Draft[],
): Posted {
  const act = touching(tx);
  const originals = listActEntries(tx, wrong.actId).filter((entry) => entry.kind !== "reversal");
  // An act that only takes back, with or without a settling entry of its own.
  if (originals.every((entry) => entry.kind === "settling")) {
    throw new AppError("ledger-correction-of-reversal");
  }
  const standing = originals.filter((entry) => reversalOf(tx, entry.id) === null);
  const first = standing[0];
  if (!first) throw new AppError("undone-already");

  const entries: ReadyEntry[] = [...standing].reverse().map((entry) => {
    const lines = loadLines(tx, entry.id);
    const back = reversed(lines);
    for (const line of back) applyLine(line, act.holdings);
    return {
      kind: "reversal",
      occurredAt: entry.occurredAt,
      subject: wrong.subject,
      reverses: entry.id,
      note: wrong.note ?? null,
      lines: back,
      totals: { kind: entry.kind, lines, sign: -1 },
    };
  });
  entries.push(...replacement.map((draft) => drafted(draft, act.holdings)));

  const accounts = new Map(
    entries.flatMap((entry) => entry.lines.map((line) => [line.holderId, line.account])),
  );
  const settling = settlingLines(
    [...act.touched.values()].map((short) => ({
      account: accounts.get(short.holderId) ?? "lot",
      holderId: short.holderId,
      materialId: short.materialId,
      holding: short.now,
    })),
  );
  if (settling.length > 0) {
    entries.push({
      kind: "settling",
      occurredAt: first.occurredAt,
      subject: wrong.subject,
      reverses: null,
      note: null,
      lines: settling,
      totals: { kind: "settling", lines: settling, sign: 1 },
    });
  }
  return write(tx, meta, entries, act.touched);
}

function drafted(draft: Draft, holdings: (h: number, m: number) => Holding): ReadyEntry {
  const lines = split(draft.kind, draft.lines, holdings);
  return {
    kind: draft.kind,
    occurredAt: draft.occurredAt,
    subject: draft.subject,
    reverses: null,
    note: draft.note ?? null,
    lines,
    totals: { kind: draft.kind, lines, sign: 1 },
  };
}

/** A record that arrives late for a closed month is booked on the first open day and names its true day. */
function bookedDay(trueDay: Day, lastClosed: Month | null): { day: Day; concerns: Day | null } {
  if (lastClosed === null || monthOf(trueDay) > lastClosed) return { day: trueDay, concerns: null };
  return { day: firstDayOf(nextMonth(lastClosed)), concerns: trueDay };
}

function write(
  tx: Tx,
  meta: ActMeta,
  entries: readonly ReadyEntry[],
  touched: ReadonlyMap<string, Touched>,
): Posted {
  const names = definitions(tx);
  const scheme = requireScheme(tx);
  const lastClosed = prepared(tx.client, "select max(month) from periods")
    .pluck()
    .get() as Month | null;
  const head = ledgerHead(tx);
  const actId = head.entryId + 1;
  let { entryId: id, hash: prevHash } = head;

  for (const entry of entries) {
    id += 1;
    const booked = bookedDay(dayOf(entry.occurredAt, scheme.timeZone), lastClosed);
    const content = canonicalOf(
      {
        id,
        actId,
        kind: entry.kind,
        ruleVersion: RULE_VERSION,
        occurredAt: entry.occurredAt,
        bookedDay: booked.day,
        concernsDay: booked.concerns,
        recordedAt: meta.now,
        doneBy: meta.doneBy,
        sentBy: meta.sentBy,
        device: meta.device,
        subject: entry.subject,
        reverses: entry.reverses,
        noteHash: entry.note === null ? null : sha256(scheme.noteSalt, entry.note),
      },
      entry.lines,
      names,
    );
    const hash = sha256(prevHash, canonicalText(content));
    insertEntry(tx, content, entry.lines, prevHash, hash);
    prevHash = hash;
    for (const delta of totalsOf(entry.totals.kind, entry.totals.lines, entry.totals.sign, names)) {
      addTotals(tx, "day", booked.day, delta);
      addTotals(tx, "month", monthOf(booked.day), delta);
    }
    for (const delta of scaleTotalsOf(
      entry.totals.kind,
      entry.totals.lines,
      entry.totals.sign,
      names,
    )) {
      addScaleTotals(tx, monthOf(booked.day), delta);
    }
  }
  for (const holding of touched.values()) writeHolding(tx, holding);
  return { actId, entryIds: entries.map((_, index) => actId + index) };
}

function sha256(before: string, text: string): string {
  return createHash("sha256").update(before).update(text).digest("hex");
}
