/**
 * The ledger as nothing but a list of movements. A holding is what filtering the list gives; nothing is
 * kept beside it, so nothing can disagree with it. Slow and obvious on purpose.
 */
import type { Account, Basis, Dimension, EntryKind, OriginType } from "@/lib/ledger/terms";

/** One part of one line: grams into (above zero) or out of an account. */
export type Movement = {
  entry: number;
  act: number;
  /** The day that reports count. */
  day: string;
  account: Account;
  cause: string | null;
  holder: number | null;
  material: number;
  dim: Dimension;
  key: number;
  grams: number;
};

/** What a report counts and no account holds: bags, accepted, rejected. Bags are counted, not weighed. */
export type Figure = {
  entry: number;
  act: number;
  day: string;
  column: "accepted" | "rejected" | "bags";
  material: number;
  origin: number;
  grams: number;
};

/** A reading of a scale or a guess, under the measure that it counts for. */
export type Reading = {
  entry: number;
  act: number;
  day: string;
  measure: string;
  basis: Basis;
  scale: number;
  grams: number;
  mpe: number;
};

export type EntryNote = {
  entry: number;
  act: number;
  kind: EntryKind;
  trueDay: string;
  day: string;
  reverses: number | null;
};

/** What numbers stand for; the scheme's own lists, told by the test. */
export type Naming = {
  rowOf: (material: number) => number;
  typeOf: (origin: number) => OriginType;
};

export type Book = {
  naming: Naming;
  entries: EntryNote[];
  movements: Movement[];
  figures: Figure[];
  readings: Reading[];
  /** "2026-02" when February and all before it are closed. */
  lastClosed: string | null;
};

export function emptyBook(naming: Naming): Book {
  return { naming, entries: [], movements: [], figures: [], readings: [], lastClosed: null };
}

export const sumOf = (list: readonly { grams: number }[]): number =>
  list.reduce((sum, item) => sum + item.grams, 0);

/** The parts of a holder's material in one dimension, by key, none at zero. */
export function partsHeld(
  book: Book,
  holder: number,
  material: number,
  dim: Dimension,
): { key: number; grams: number }[] {
  const own = book.movements.filter(
    (move) => move.holder === holder && move.material === material && move.dim === dim,
  );
  return [...new Set(own.map((move) => move.key))]
    .sort((a, b) => a - b)
    .map((key) => ({ key, grams: sumOf(own.filter((move) => move.key === key)) }))
    .filter((part) => part.grams !== 0);
}

/** Grams of one material in one holder. */
export function heldIn(book: Book, holder: number, material: number): number {
  return sumOf(partsHeld(book, holder, material, "O"));
}

/** Every (holder, material) that any movement, or one act's movements, ever touched. */
export function touchedHoldings(
  book: Book,
  act: number | null = null,
): { account: Account; holder: number; material: number }[] {
  const found = new Map<string, { account: Account; holder: number; material: number }>();
  for (const { account, holder, material, act: of } of book.movements) {
    if (holder === null || (act !== null && of !== act)) continue;
    found.set(`${holder} ${material}`, { account, holder, material });
  }
  return [...found.values()];
}
