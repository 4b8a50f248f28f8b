/** The lines and drafts that random histories are made of. */
import type { Draft } from "@/lib/ledger/commands/post";
import { REJECT, UNSORTED, type Basis, type EntryKind } from "@/lib/ledger/terms";
import type { Picks } from "./picks";
import { held, noonOf, type Lot, type World } from "./world";

export type Line = Draft["lines"][number];
/** The acts's drafts; none when the shed has nothing to do it with. */
export type Maker = (world: World, picks: Picks) => Draft[];

/** Days from January to June 2026, so that records also arrive late for a closed month. */
export function someDay(picks: Picks): string {
  return `2026-0${picks.within(1, 6)}-${String(picks.within(1, 28)).padStart(2, "0")}`;
}

/** A draft of a random day; lines of no grams are left out. */
export function draft(kind: EntryKind, picks: Picks, lines: Line[], day = someDay(picks)): Draft {
  return {
    kind,
    occurredAt: noonOf(day),
    subject: `history:${kind}`,
    lines: lines.filter((line) => line.grams !== 0),
  };
}

export function readingOf(picks: Picks): {
  basis: Basis;
  scaleNumber: number | null;
  mpeMilligrams: number;
} {
  if (picks.often(3)) return { basis: "estimated", scaleNumber: null, mpeMilligrams: 0 };
  return {
    basis: picks.often(5) ? "checked" : "unchecked",
    scaleNumber: picks.within(1, 2),
    mpeMilligrams: picks.within(1, 3) * 5000,
  };
}

export const lotLine = ({ holder, material }: Lot, grams: number): Line => ({
  account: "lot",
  holderId: holder,
  materialId: material,
  grams,
});
export const runLine = (run: number, materialId: number, grams: number): Line => ({
  account: "run",
  holderId: run,
  materialId,
  grams,
});
export const binLine = (world: World, grams: number): Line => ({
  account: "reject-bin",
  holderId: world.bin,
  materialId: REJECT,
  grams,
});
export const bagLine = (bag: number, grams: number): Line => ({
  account: "bag",
  holderId: bag,
  materialId: UNSORTED,
  grams,
});

export const inLot = (world: World, lot: Lot): number => held(world, lot.holder, lot.material);
export const filledLots = (world: World): Lot[] =>
  world.lots.filter((lot) => inLot(world, lot) > 0);
export const total = (lines: readonly Line[]): number =>
  lines.reduce((sum, line) => sum + line.grams, 0);

/** A small difference of either sign, more often than not, that `grams` can bear. */
export const slip = (picks: Picks, grams: number): number =>
  Math.min(picks.often(6) ? picks.within(-12, 12) : 0, grams);
