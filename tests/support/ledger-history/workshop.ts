/** Steps, and runs from taking out to finishing. */
import type { Draft } from "@/lib/ledger/commands/post";
import { LOSS_CAUSES } from "@/lib/ledger/terms";
import {
  binLine,
  draft,
  filledLots,
  inLot,
  lotLine,
  readingOf,
  runLine,
  slip,
  total,
  type Line,
  type Maker,
} from "./lines";
import type { Picks } from "./picks";
import { held, newHolder, type Lot, type Run, type World } from "./world";

export const step: Maker = (world, picks) => {
  const first = picks.one(filledLots(world));
  if (!first) return [];
  const alike = world.lots.filter((lot) => lot.polymer === first.polymer && lot !== first);
  const second = picks.often(4)
    ? picks.one(alike.filter((lot) => inLot(world, lot) > 0))
    : undefined;
  const from = second ? [first, second] : [first];
  const into = picks.one(alike.filter((lot) => !from.includes(lot)))!;
  const taken = from.map((lot) => {
    const whole = inLot(world, lot);
    return lotLine(lot, -(picks.often(5) ? whole : picks.within(1, whole)));
  });
  // Below zero it is a gain while damp.
  const loss = Math.min(picks.within(-20, 40), -total(taken));
  return [
    draft("step", picks, [
      ...taken,
      lotLine(into, -total(taken) - loss),
      { account: "loss", cause: picks.one(LOSS_CAUSES), grams: loss },
    ]),
  ];
};

function newRun(world: World): Run {
  const run = {
    holder: newHolder(world, "run", `RUN${world.runs.length}`),
    batch: newHolder(world, "batch", `BATCH${world.runs.length}`),
  };
  world.runs.push(run);
  return run;
}

function someRun(world: World, picks: Picks): Run {
  const old = picks.one(world.runs);
  return old && picks.often(6) ? old : newRun(world);
}

/** Several lots, also of several colours, into one run: as one entry, or as one for each lot. */
export const draw: Maker = (world, picks) => {
  const lots = picks.some(filledLots(world), 3);
  if (lots.length === 0) return [];
  const run = someRun(world, picks).holder;
  const taken = lots.map((lot): [Lot, number] => [lot, picks.within(1, inLot(world, lot))]);
  const entry = (of: readonly [Lot, number][]): Draft => {
    const materials = [...new Set(of.map(([lot]) => lot.material))];
    return draft("draw", picks, [
      ...of.map(([lot, grams]) => lotLine(lot, -grams)),
      ...materials.map((material) => {
        const own = of.filter(([lot]) => lot.material === material);
        return runLine(
          run,
          material,
          own.reduce((sum, [, grams]) => sum + grams, 0),
        );
      }),
    ]);
  };
  return picks.often(5) ? taken.map((one) => entry([one])) : [entry(taken)];
};

/** What a run holds, by material. */
function inRun(world: World, run: Run): { material: number; grams: number }[] {
  return [...new Set(world.lots.map((lot) => lot.material))]
    .map((material) => ({ material, grams: held(world, run.holder, material) }))
    .filter(({ grams }) => grams > 0);
}
const running = (world: World): Run[] => world.runs.filter((run) => inRun(world, run).length > 0);

export const giveBack: Maker = (world, picks) => {
  const run = picks.one(running(world));
  const drawn = run && picks.one(inRun(world, run));
  if (!drawn) return [];
  const grams = picks.within(1, drawn.grams);
  const lot = picks.one(world.lots.filter(({ material }) => material === drawn.material))!;
  return [
    draft("return", picks, [runLine(run.holder, drawn.material, -grams), lotLine(lot, grams)]),
  ];
};

/** A run ends in pieces, regrind, unused material, scrap, loss and difference. "cut" heats nothing. */
export const finish: Maker = (world, picks) => {
  const run = picks.one(running(world));
  if (!run) return [];
  const drawn = inRun(world, run);
  let left = drawn.reduce((sum, { grams }) => sum + grams, 0);
  const upTo = (percent: number): number => {
    const grams = picks.often(6) ? picks.within(0, Math.floor((left * percent) / 100)) : 0;
    left -= grams;
    return grams;
  };
  const difference = slip(picks, left);
  left -= difference;
  const loss = upTo(10);
  const scrap = upTo(20);
  const regrind = upTo(40);
  const regrindLot = picks.one(world.lots.filter(({ kind }) => kind === "regrind"))!;
  const ownLot = picks.one(
    world.lots.filter(
      (lot) => lot !== regrindLot && drawn.some(({ material }) => material === lot.material),
    ),
  )!;
  // More than was drawn of it can come back too: the rest is then taken from all in proportion.
  const unused = upTo(picks.often(2) ? 90 : 40);
  return [
    draft(picks.often(8) ? "finish" : "cut", picks, [
      ...drawn.map(({ material, grams }) => runLine(run.holder, material, -grams)),
      lotLine(regrindLot, regrind),
      lotLine(ownLot, unused),
      binLine(world, scrap),
      { account: "loss", cause: picks.one(LOSS_CAUSES), grams: loss },
      { account: "difference", grams: difference },
      {
        account: "pieces",
        holderId: run.batch,
        materialId: drawn[0]!.material,
        grams: left,
        ...readingOf(picks),
      },
    ]),
  ];
};

/** Pieces go back to a regrind lot. */
export const takePiecesBack: Maker = (world, picks) => {
  const materials = [...new Set(world.lots.map((lot) => lot.material))];
  const pieces = world.runs.flatMap(({ batch }) =>
    materials
      .map((material) => ({ batch, material, grams: held(world, batch, material) }))
      .filter(({ grams }) => grams > 0),
  );
  const from = picks.one(pieces);
  if (!from) return [];
  const grams = picks.within(1, from.grams);
  const lot = picks.one(world.lots.filter(({ kind }) => kind === "regrind"))!;
  return [
    draft("take-back", picks, [
      { account: "pieces", holderId: from.batch, materialId: from.material, grams: -grams },
      lotLine(lot, grams),
    ]),
  ];
};

/** A whole run that went wrong, as one act: taken out, moulded, and all of its pieces ground up again. */
export const grindUp: Maker = (world, picks) => {
  const filled = filledLots(world);
  const regrind = world.lots.filter(({ kind }) => kind === "regrind");
  const from = picks.one(filled.filter((lot) => regrind.includes(lot))) ?? picks.one(filled);
  if (!from) return [];
  const run = newRun(world);
  const grams = inLot(world, from);
  const pieces: Line = {
    account: "pieces",
    holderId: run.batch,
    materialId: from.material,
    grams,
  };
  return [
    draft("draw", picks, [lotLine(from, -grams), runLine(run.holder, from.material, grams)]),
    draft("finish", picks, [
      runLine(run.holder, from.material, -grams),
      { ...pieces, ...readingOf(picks) },
    ]),
    draft("take-back", picks, [{ ...pieces, grams: -grams }, lotLine(picks.one(regrind)!, grams)]),
  ];
};
