/** Acts of the plain model: plain, taking back, correcting, and the settling of what is short. */
import { DIMENSIONS, PHYSICAL, UNSORTED, type Account, type EntryKind } from "@/lib/ledger/terms";
import { shares, type Weight } from "./largest-remainder";
import {
  partsHeld,
  sumOf,
  touchedHoldings,
  type Book,
  type EntryNote,
  type Figure,
  type Movement,
  type Reading,
} from "./movements";
import { splitLines, type Given, type SplitLine } from "./splitting";

export type PlainDraft = { kind: EntryKind; day: string; lines: readonly Given[] };

/** A record that arrives late for a closed month is booked on the first open day. */
function bookedDay(book: Book, trueDay: string): string {
  if (book.lastClosed === null || trueDay.slice(0, 7) > book.lastClosed) return trueDay;
  const [year = 0, month = 0] = book.lastClosed.split("-").map(Number);
  return new Date(Date.UTC(year, month, 1)).toISOString().slice(0, 10);
}

function openEntry(
  book: Book,
  act: number,
  kind: EntryKind,
  trueDay: string,
  reverses: number | null = null,
): EntryNote {
  const entry = book.entries.length + 1;
  const note = { entry, act, kind, trueDay, day: bookedDay(book, trueDay), reverses };
  book.entries.push(note);
  return note;
}

const has = (lines: readonly Given[], account: Account, sign: 1 | -1): boolean =>
  lines.some((line) => line.account === account && Math.sign(line.grams) === sign);

/** What sorting put into lots, what became reject, and how many bags came in. */
function figuresOf(note: EntryNote, split: readonly SplitLine[]): Figure[] {
  const lines = split.map((line) => line.given);
  const fromBag = has(lines, "bag", -1);
  const fromLot = has(lines, "lot", -1) && !has(lines, "run", -1);
  const figures: Figure[] = [];
  const add = (column: Figure["column"], material: number, origin: number, grams: number): void => {
    figures.push({ ...note, column, material, origin, grams });
  };
  for (const { given, parts } of split) {
    for (const part of parts.filter((one) => one.dim === "O" && one.grams > 0)) {
      if (given.account === "lot" && fromBag) add("accepted", part.material, part.key, part.grams);
      if (given.account !== "reject-bin") continue;
      if (fromBag || fromLot) add("rejected", part.material, part.key, part.grams);
      if (fromLot) add("accepted", part.came, part.key, -part.grams);
    }
    if (note.kind === "weigh-in" && given.account === "source") {
      add("bags", UNSORTED, given.originNo ?? 0, 1);
    }
  }
  return figures;
}

function measureOf(
  book: Book,
  lines: readonly Given[],
  line: Given,
  kind: EntryKind,
): string | null {
  if (kind === "count") return "counted";
  switch (line.account) {
    case "source":
      return book.naming.typeOf(line.originNo ?? 0) === "donated" ? "collected" : "other-in";
    case "lot":
      return has(lines, "bag", -1) && line.grams > 0 ? "accepted" : null;
    case "reject-bin":
      return line.grams > 0 && !has(lines, "run", -1) ? "rejected" : null;
    case "opening":
    case "disposed":
    case "passed-on":
    case "pieces":
      return line.account;
    default:
      return null;
  }
}

function readingsOf(book: Book, note: EntryNote, lines: readonly Given[]): Reading[] {
  return lines.flatMap((line) => {
    const measure = measureOf(book, lines, line, note.kind);
    if (!line.basis || measure === null) return [];
    const entersTheBook = line.account === "source" || line.account === "opening";
    return [
      {
        ...note,
        measure,
        basis: line.basis,
        scale: line.scaleNumber ?? 0,
        grams: entersTheBook ? -line.grams : line.grams,
        mpe: line.mpeMilligrams ?? 0,
      },
    ];
  });
}

function write(book: Book, note: EntryNote, split: readonly SplitLine[]): void {
  for (const { given, parts } of split) {
    for (const { material, dim, key, grams } of parts) {
      book.movements.push({
        entry: note.entry,
        act: note.act,
        day: note.day,
        account: given.account,
        cause: given.cause ?? null,
        holder: given.holderId ?? null,
        material,
        dim,
        key,
        grams,
      });
    }
  }
}

function postDraft(book: Book, act: number, draft: PlainDraft): void {
  const note = openEntry(book, act, draft.kind, draft.day);
  const split = splitLines(book, draft.kind, draft.lines);
  write(book, note, split);
  book.figures.push(...figuresOf(note, split));
  book.readings.push(...readingsOf(book, note, draft.lines));
}

/** Entries of an act that still stand: neither reversing nor reversed. */
export function standing(book: Book, act: number): EntryNote[] {
  return book.entries.filter(
    (entry) =>
      entry.act === act &&
      entry.kind !== "reversal" &&
      !book.entries.some((later) => later.reverses === entry.entry),
  );
}

function reverseEntries(book: Book, act: number, of: readonly EntryNote[]): void {
  for (const wrong of [...of].reverse()) {
    const note = openEntry(book, act, "reversal", wrong.trueDay, wrong.entry);
    const again = { entry: note.entry, act, day: note.day };
    const negatives = <T extends { entry: number; grams: number }>(list: readonly T[]): T[] =>
      list
        .filter((item) => item.entry === wrong.entry)
        .map((item) => ({ ...item, ...again, grams: -item.grams }));
    book.movements.push(...negatives<Movement>(book.movements));
    book.figures.push(...negatives<Figure>(book.figures));
    book.readings.push(
      ...negatives<Reading>(book.readings).map((reading) => ({ ...reading, mpe: -reading.mpe })),
    );
  }
}

/** Parts that end what a holding is short of, and what of it comes from difference. */
function mended(
  held: readonly Weight[],
  lacking: number,
): { fromOutside: Weight[]; own: Weight[] } {
  const missing = held
    .filter((part) => part.grams < 0)
    .map(({ key, grams }) => ({ key, grams: -grams }));
  const fromOutside = [...shares(lacking, missing)].map(([key, grams]) => ({ key, grams }));
  const stillMissing = missing.map(({ key, grams }) => ({
    key,
    grams: grams - sumOf(fromOutside.filter((part) => part.key === key)),
  }));
  const givers = shares(sumOf(stillMissing), held);
  return {
    fromOutside,
    own: [...stillMissing, ...[...givers].map(([key, grams]) => ({ key, grams: -grams }))],
  };
}

function settle(book: Book, act: number, trueDay: string): void {
  const movements: Omit<Movement, "entry" | "act" | "day">[] = [];
  for (const { account, holder, material } of touchedHoldings(book, act)) {
    const lacking = Math.max(0, -sumOf(partsHeld(book, holder, material, "O")));
    for (const dim of DIMENSIONS) {
      const { fromOutside, own } = mended(partsHeld(book, holder, material, dim), lacking);
      const into = { account, holder, cause: null, material, dim };
      const out = { ...into, account: "difference" as const, holder: null };
      for (const part of fromOutside) {
        movements.push({ ...into, ...part }, { ...out, key: part.key, grams: -part.grams });
      }
      for (const part of own) movements.push({ ...into, ...part });
    }
  }
  const real = movements.filter((move) => move.grams !== 0);
  if (real.length === 0) return;
  const { entry, day } = openEntry(book, act, "settling", trueDay);
  book.movements.push(...real.map((move) => ({ ...move, entry, act, day })));
}

const isPhysical = (account: Account): boolean =>
  (PHYSICAL as readonly Account[]).includes(account);

/** Holdings that stand below zero. */
export function shortHoldings(book: Book): { holder: number; material: number }[] {
  return touchedHoldings(book).filter(
    ({ account, holder, material }) =>
      isPhysical(account) &&
      DIMENSIONS.some((dim) =>
        partsHeld(book, holder, material, dim).some((part) => part.grams < 0),
      ),
  );
}

/** @returns the act's number, or null when it would leave a holder short (nothing is kept then) */
export function postPlain(book: Book, drafts: readonly PlainDraft[]): number | null {
  const act = book.entries.length + 1;
  for (const draft of drafts) postDraft(book, act, draft);
  if (shortHoldings(book).length === 0) return act;
  book.entries = book.entries.filter((item) => item.act !== act);
  book.movements = book.movements.filter((item) => item.act !== act);
  book.figures = book.figures.filter((item) => item.act !== act);
  book.readings = book.readings.filter((item) => item.act !== act);
  return null;
}

/** Takes an act back and posts what should have stood there; with no drafts it is an undo. */
export function correctPlain(book: Book, wrong: number, drafts: readonly PlainDraft[]): number {
  const act = book.entries.length + 1;
  const of = standing(book, wrong);
  reverseEntries(book, act, of);
  for (const draft of drafts) postDraft(book, act, draft);
  settle(book, act, of[0]?.trueDay ?? "");
  return act;
}
