/** What comes in: bags, the first day's stock, history from before it; and what sorting makes of bags. */
import { LOSS_CAUSES, UNKNOWN_ORIGIN, UNSORTED } from "@/lib/ledger/terms";
import {
  bagLine,
  binLine,
  draft,
  lotLine,
  readingOf,
  slip,
  total,
  type Line,
  type Maker,
} from "./lines";
import type { Picks } from "./picks";
import { held, newHolder, type Lot } from "./world";

export const weighIn: Maker = (world, picks) => {
  const bag = newHolder(world, "bag", `BAG${world.bags.length}`);
  world.bags.push(bag);
  const grams = picks.within(1, 9000);
  const originNo = picks.one(world.origins)!.no;
  const arrival = draft("weigh-in", picks, [
    { account: "source", originNo, materialId: UNSORTED, grams: -grams, ...readingOf(picks) },
    bagLine(bag, grams),
  ]);
  if (!picks.often(2)) return [arrival];
  // "One kind only": straight into its lot, as a sorting of its own.
  const lot = picks.one(world.lots)!;
  return [arrival, draft("sort", picks, [bagLine(bag, -grams), lotLine(lot, grams)])];
};

/** Divides grams over lots; the last takes the rest. */
function piles(picks: Picks, grams: number, into: readonly Lot[]): Line[] {
  let left = grams;
  return into.map((lot, index) => {
    const pile = index === into.length - 1 ? left : picks.within(0, left);
    left -= pile;
    return { ...lotLine(lot, pile), ...(picks.often(7) ? readingOf(picks) : {}) };
  });
}

export const sort: Maker = (world, picks) => {
  const full = world.bags.filter((bag) => held(world, bag, UNSORTED) > 0);
  const taken = picks.some(full, 3).map((bag) => {
    const whole = held(world, bag, UNSORTED);
    return bagLine(bag, -(picks.often(8) ? whole : picks.within(1, whole)));
  });
  if (taken.length === 0) return [];
  let left = -total(taken);
  const difference = slip(picks, left);
  left -= difference;
  const loss = picks.often(3) ? picks.within(0, Math.min(left, 40)) : 0;
  left -= loss;
  const reject = picks.often(6) ? picks.within(0, Math.ceil(left / 4)) : 0;
  left -= reject;
  return [
    draft("sort", picks, [
      ...taken,
      ...piles(picks, left, picks.some(world.lots, 4)),
      { ...binLine(world, reject), ...(picks.often(5) ? readingOf(picks) : {}) },
      { account: "loss", cause: picks.one(LOSS_CAUSES), grams: loss },
      { account: "difference", grams: difference },
    ]),
  ];
};

/** Stock of the scheme's first day. */
export const open: Maker = (world, picks) => {
  const grams = picks.within(1, 3000);
  const lot = picks.one(world.lots)!;
  const { material: materialId } = lot;
  return [
    draft(
      "opening",
      picks,
      [
        {
          account: "opening",
          originNo: UNKNOWN_ORIGIN,
          materialId,
          grams: -grams,
          ...readingOf(picks),
        },
        lotLine(lot, grams),
      ],
      "2026-01-01",
    ),
  ];
};

/** A row of a spreadsheet from before the first day: collected, and never in the shed. */
export const importOld: Maker = (world, picks) => {
  const grams = picks.within(1, 3000);
  const originNo = picks.one(world.origins)!.no;
  return [
    draft(
      "import",
      picks,
      [
        {
          account: "source",
          originNo,
          materialId: UNSORTED,
          grams: -grams,
          basis: "imported",
          scaleNumber: null,
          mpeMilligrams: 0,
        },
        { account: "before-opening", grams },
      ],
      `2025-1${picks.within(0, 2)}-05`,
    ),
  ];
};
