/** Steps, counts and moves of lots in a random history. */

import { correctMove } from "@/lib/stock/commands/correct-move";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { countLot } from "@/lib/stock/commands/count-lot";
import { mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import { correctCount } from "@/lib/stock/commands/review-count";
import { saveStep } from "@/lib/stock/commands/save-step";
import { getLot } from "@/lib/stock/queries/lots";
import { onPan } from "../shed";

import {
  asLead,
  asVolunteer,
  base,
  any,
  lot,
  pickRow,
  rows,
  shown,
  within,
  REASON,
  type Act,
  type Bench,
  type LotRow,
} from "./desk";
const STEPS = ["washing", "drying", "shredding"] as const;

function stepOf(bench: Bench, from: LotRow) {
  const { random, shed } = bench;
  const all = random.chance(0.6);
  const taken = all ? from.grams : shown(from.grams * random.next());
  return {
    kind: random.pick(STEPS),
    occurredAt: bench.now,
    minutes: null,
    inputs: [
      {
        number: from.number,
        amount: all
          ? { how: "all" as const }
          : {
              how: "taken" as const,
              scaleId: shed.scaleId,
              readings: [onPan(taken)],
              all: false,
            },
        count: null,
      },
    ],
    outputs: [
      {
        kind: null,
        colourCode: null,
        scaleId: shed.scaleId,
        reading: onPan(shown(taken * (0.9 + random.next() * 0.13))),
      },
    ],
    losses: random.chance(0.3) ? [{ cause: "metal" as const, grams: 5 }] : [],
    cause: "dust" as const,
    confirmed: true,
  };
}

export const step: Act = (bench) => {
  const from = lot(bench, 50);
  if (!from) return;
  const input = { ...base(bench), ...stepOf(bench, from) };
  saveStep(asLead(bench, input), input);
};

export const correctAStep: Act = (bench) => {
  const id = any<"step">(bench, "steps");
  if (!id) return;
  const [from] = rows<LotRow>(
    bench,
    "select l.number, i.grams from step_inputs i join lots l on l.id = i.lot_id where i.step_id = ?",
    id,
  );
  if (!from) return;
  const { kind } = rows<{ kind: (typeof STEPS)[number] }>(
    bench,
    "select kind from steps where id = ?",
    id,
  )[0]!;
  const grams = Math.max(5, Math.round(from.grams * (0.8 + bench.random.next() * 0.4)));
  const replacement = {
    ...stepOf(bench, { ...from, grams }),
    kind,
    inputs: [{ number: from.number, amount: { how: "stated" as const, grams }, count: null }],
  };
  const input = {
    ...base(bench),
    id,
    reason: REASON,
    replacement: bench.random.chance(0.2) ? null : replacement,
  };
  correctStep(asLead(bench, input), input);
};

export const count: Act = (bench) => {
  const of = lot(bench, 0);
  if (!of) return;
  const { random, shed } = bench;
  const ctx = bench.shed.ctx("volunteer", bench.now);
  const seen = getLot(ctx, of.number)?.seen;
  if (!seen) return;
  const input = {
    ...base(bench),
    number: of.number,
    occurredAt: bench.now,
    counted: random.chance(0.15)
      ? { found: "empty" as const }
      : {
          found: "weighed" as const,
          scaleId: shed.scaleId,
          readings: [onPan(shown(of.grams + random.normal(0, 60)))],
        },
    seen,
    confirmed: true,
  };
  countLot(asVolunteer(bench, input), input);
};

export const correctACount: Act = (bench) => {
  const id = any<"count">(bench, "counts");
  if (!id) return;
  const { random, shed } = bench;
  const input = {
    ...base(bench),
    id,
    reason: REASON,
    replacement: random.chance(0.3)
      ? null
      : {
          found: "weighed" as const,
          scaleId: shed.scaleId,
          readings: [onPan(shown(within(random, 5, 3_000)))],
        },
  };
  correctCount(asLead(bench, input), input);
};

export const split: Act = (bench) => {
  const from = lot(bench, 100);
  if (!from) return;
  const input = {
    ...base(bench),
    number: from.number,
    occurredAt: bench.now,
    count: null,
    amount: {
      scaleId: bench.shed.scaleId,
      readings: [onPan(shown(from.grams * bench.random.next()))],
    },
    place: "",
  };
  splitLot(asLead(bench, input), input);
};

export const merge: Act = (bench) => {
  const pair = pickRow<{ number: number; toNumber: number }>(
    bench,
    `select a.number, b.number as toNumber from lots a join lots b on b.material_id = a.material_id and b.id <> a.id
       join balances x on x.holder_id = a.holder_id and x.grams > 0 where b.closed_at is null`,
  );
  if (!pair) return;
  const input = {
    ...base(bench),
    ...pair,
    occurredAt: bench.now,
    count: null,
    amount: { how: "all" as const },
  };
  mergeLot(asLead(bench, input), input);
};

export const correctAMove: Act = (bench) => {
  const id = any<"lot-move">(bench, "lot_moves");
  if (!id) return;
  const replacement = bench.random.chance(0.4)
    ? null
    : { grams: within(bench.random, 1, 2_000), toNumber: null, identity: null };
  const input = { ...base(bench), id, reason: REASON, replacement };
  correctMove(asLead(bench, input), input);
};
