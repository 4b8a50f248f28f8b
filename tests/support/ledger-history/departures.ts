/** Counting, turning stock away, and what leaves the shed. */
import type { Draft } from "@/lib/ledger/commands/post";
import { REJECT } from "@/lib/ledger/terms";
import {
  binLine,
  draft,
  filledLots,
  inLot,
  lotLine,
  readingOf,
  slip,
  total,
  type Line,
  type Maker,
} from "./lines";
import { held } from "./world";

export const count: Maker = (world, picks) => {
  const lot = picks.one(world.lots)!;
  const whole = inLot(world, lot);
  // "Bin is empty" posts all that is left.
  const found = picks.often(2) ? -whole : Math.max(-whole, picks.within(-60, 60));
  if (found === 0) return [];
  return [
    draft("count", picks, [
      { ...lotLine(lot, found), ...readingOf(picks) },
      { account: "difference", grams: -found },
    ]),
  ];
};

/** From the reject bin, or from one or two lots; disposed of, or passed on with a receipt or without. */
export const remove: Maker = (world, picks) => {
  const inBin = held(world, world.bin, REJECT);
  const lines: Line[] =
    inBin > 0 && picks.often(5)
      ? [binLine(world, -picks.within(1, inBin))]
      : picks
          .some(filledLots(world), 2)
          .map((lot) => lotLine(lot, -picks.within(1, inLot(world, lot))));
  if (lines.length === 0) return [];
  const difference = slip(picks, -total(lines) - 1);
  const grams = -total(lines) - difference;
  const goes: Line = picks.often(5)
    ? { account: "disposed", grams }
    : { account: "passed-on", cause: picks.often(5) ? "proven" : "unproven", grams };
  return [
    draft("removal", picks, [
      ...lines,
      { ...goes, ...readingOf(picks) },
      { account: "difference", grams: difference },
    ]),
  ];
};

/** The receiver's receipt: what one removal passed on unproven becomes proven, with the parts it had. */
export const receive: Maker = (world, picks) => {
  const { movements } = world.book;
  const unproven = movements.filter(
    (move) =>
      move.cause === "unproven" &&
      move.dim === "O" &&
      move.grams > 0 &&
      world.acts.some((act) => act.id === move.act && act.state === "stands"),
  );
  const chosen = picks.one(unproven);
  if (!chosen) return [];
  const same = movements.filter(
    (move) =>
      move.entry === chosen.entry && move.cause === "unproven" && move.material === chosen.material,
  );
  const partsOf = (dim: "O" | "H") =>
    same.filter((move) => move.dim === dim).map((move) => [move.key, -move.grams] as const);
  const grams = -partsOf("O").reduce((sum, [, part]) => sum + part, 0);
  const from = { materialId: chosen.material, parts: { O: partsOf("O"), H: partsOf("H") } };
  const lines: Line[] = [
    { account: "passed-on", cause: "unproven", grams: -grams, from },
    { account: "passed-on", cause: "proven", grams },
  ];
  return [draft("receipt", picks, lines)] satisfies Draft[];
};

/** A lot turns out to be no good: to the reject bin, as weighed there. */
export const turnAway: Maker = (world, picks) => {
  const lots = picks.some(filledLots(world), 2);
  if (lots.length === 0) return [];
  const lines = lots.map((lot) => lotLine(lot, -picks.within(1, inLot(world, lot))));
  const difference = slip(picks, -total(lines) - 1);
  return [
    draft("move", picks, [
      ...lines,
      { ...binLine(world, -total(lines) - difference), ...readingOf(picks) },
      { account: "difference", grams: difference },
    ]),
  ];
};

/** More than a lot holds: must be refused. */
export const overdraw: Maker = (world, picks) => {
  const lot = picks.one(world.lots)!;
  const grams = inLot(world, lot) + picks.within(1, 500);
  return [draft("removal", picks, [lotLine(lot, -grams), { account: "disposed", grams }])];
};
