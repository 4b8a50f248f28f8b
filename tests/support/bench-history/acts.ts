/** What people do at the bench in a random history: one command each, with whatever numbers come. */
import { newId, type Id } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";
import { correctRemoval } from "@/lib/removals/commands/correct";
import { enterReceipt, undoReceipt } from "@/lib/removals/commands/receipts";
import { takeAway, undoRemoval } from "@/lib/removals/commands/take-away";
import { closeSorting } from "@/lib/sorting/commands/close";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { correctMove } from "@/lib/stock/commands/correct-move";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { countLot } from "@/lib/stock/commands/count-lot";
import { mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import { correctCount } from "@/lib/stock/commands/review-count";
import { saveStep } from "@/lib/stock/commands/save-step";
import { undoCount } from "@/lib/stock/commands/undo-count";
import { undoMove } from "@/lib/stock/commands/undo-move";
import { undoStep } from "@/lib/stock/commands/undo-step";
import { getLot } from "@/lib/stock/queries/lots";
import { correctWeighIn } from "@/lib/weighing/commands/correct";
import { getStoredWeighIn } from "@/lib/weighing/queries/stored";
import type { Random } from "@/db/seed/random";
import { NOON } from "../scheme";
import { onPan, sorting, type Shed, type WeighedIn } from "../shed";

export type Bench = {
  shed: Shed;
  random: Random;
  /** Moves on with every act, so that undo is sometimes too late. */
  now: Instant;
  destinations: { disposed: Id<"destination">; passedOn: Id<"destination"> };
};

type LotRow = { number: number; grams: number };

const rows = <T>(bench: Bench, sql: string, ...values: unknown[]): T[] =>
  bench.shed.db.reader.client.prepare(sql).all(...values) as T[];
const pickRow = <T>(bench: Bench, sql: string, ...values: unknown[]): T | undefined => {
  const found = rows<T>(bench, sql, ...values);
  return found.length === 0 ? undefined : bench.random.pick(found);
};

const LOTS = `select l.number, coalesce(b.grams, 0) as grams from lots l
  left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id`;
const lot = (bench: Bench, least = 1): LotRow | undefined =>
  pickRow(bench, `${LOTS} where coalesce(b.grams, 0) >= ?`, least);

const within = (random: Random, from: number, to: number): number =>
  from + random.int(Math.max(1, to - from + 1));
/** A weight as the bench scale shows it: whole steps of 5 g, at least one. */
const shown = (grams: number): number => Math.min(14_000, Math.max(5, Math.round(grams / 5) * 5));

const asLead = (bench: Bench, input: object): Context => bench.shed.ctx("lead", bench.now, input);
const asVolunteer = (bench: Bench, input: object): Context =>
  bench.shed.ctx("volunteer", bench.now, input);
const base = (bench: Bench) => ({ requestId: newId(bench.now) });
const REASON = "It was read wrongly";

type Act = (bench: Bench) => void;

const weigh: Act = ({ shed, random }) => {
  shed.weigh(shown(within(random, 300, 6_000)), { point: random.int(3) });
};

const COLOURS = ["blue", "white", "red"] as const;

function pilesOf(random: Random, net: number): Parameters<typeof sorting>[2] {
  const piles: { colour: string; grams: number }[] = [];
  let left = net + Math.round(random.normal(0, 8) / 5) * 5;
  const rejected = random.chance(0.4) ? shown(left * 0.1) : 0;
  left -= rejected;
  for (const colour of COLOURS) {
    if (left < 50 || random.chance(0.25)) continue;
    const grams = colour === "red" ? shown(left) : shown(left * random.next());
    piles.push({ colour, grams });
    left -= grams;
  }
  return {
    piles,
    rejects: rejected > 0 ? [{ grams: rejected }] : [],
    cause: "dirt",
    confirmedAbove: true,
  };
}

const sort: Act = (bench) => {
  const waiting = rows<WeighedIn>(
    bench,
    `select b.id as bagId, b.code, w.net_grams as netGrams from bags b
       join weigh_ins w on w.bag_id = b.id and w.state = 'posted' where b.state = 'weighed'`,
  );
  const bags = waiting.slice(0, within(bench.random, 1, 3));
  if (bags.length === 0) return;
  const net = bags.reduce((sum, { netGrams }) => sum + netGrams, 0);
  const input = {
    ...sorting(bench.shed, bags, pilesOf(bench.random, net)),
    requestId: newId(bench.now),
  };
  closeSorting(asVolunteer(bench, input), input);
};

const latest = <Noun extends string>(bench: Bench, table: string, state = "posted") =>
  rows<{ id: Id<Noun> }>(
    bench,
    `select id from ${table} where state = '${state}' order by recorded_at desc, id desc limit 1`,
  )[0]?.id;
const any = <Noun extends string>(bench: Bench, table: string, state = "posted") =>
  pickRow<{ id: Id<Noun> }>(bench, `select id from ${table} where state = '${state}'`)?.id;

const undoSort: Act = (bench) => {
  const id = latest<"sorting">(bench, "sorting_sessions", "closed");
  if (!id) return;
  const input = { ...base(bench), id };
  undoSorting(asVolunteer(bench, input), input);
};

const correctSort: Act = (bench) => {
  const id = any<"sorting">(bench, "sorting_sessions", "closed");
  if (!id) return;
  const [{ net } = { net: 0 }] = rows<{ net: number }>(
    bench,
    "select net_grams as net from sorting_sessions where id = ?",
    id,
  );
  const {
    requestId: _id,
    codes: _codes,
    ...table
  } = sorting(bench.shed, [], pilesOf(bench.random, net));
  const replacement = bench.random.chance(0.25) ? null : table;
  const input = { ...base(bench), id, reason: REASON, replacement };
  correctSorting(asLead(bench, input), input);
};

const correctWeighing: Act = (bench) => {
  const id = any<"weigh-in">(bench, "weigh_ins");
  const stored = id && getStoredWeighIn(bench.shed.db.reader, id);
  if (!id || !stored) return;
  const { scaleId, occurredAt, polymer, kind, colourCode, oneKind, condition } = stored;
  const replacement = {
    scaleId,
    occurredAt,
    polymer,
    kind,
    colourCode,
    oneKind,
    condition,
    pointId: bench.shed.points[bench.random.int(3)] ?? stored.pointId,
    readings: [onPan(shown(stored.netGrams + within(bench.random, -300, 300)))],
  };
  const input = { ...base(bench), id, reason: REASON, replacement };
  correctWeighIn(asLead(bench, input), input);
};

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

const step: Act = (bench) => {
  const from = lot(bench, 50);
  if (!from) return;
  const input = { ...base(bench), ...stepOf(bench, from) };
  saveStep(asLead(bench, input), input);
};

const undoOf =
  <Noun extends string>(
    table: string,
    undo: (ctx: Context, input: { requestId: string; id: Id<Noun> }) => unknown,
    as: (bench: Bench, input: object) => Context = asLead,
  ): Act =>
  (bench) => {
    const id = latest<Noun>(bench, table);
    if (!id) return;
    const input = { ...base(bench), id };
    undo(as(bench, input), input);
  };

const correctAStep: Act = (bench) => {
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

const count: Act = (bench) => {
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

const correctACount: Act = (bench) => {
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

const split: Act = (bench) => {
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

const merge: Act = (bench) => {
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

const correctAMove: Act = (bench) => {
  const id = any<"lot-move">(bench, "lot_moves");
  if (!id) return;
  const replacement = bench.random.chance(0.4)
    ? null
    : { grams: within(bench.random, 1, 2_000), toNumber: null, identity: null };
  const input = { ...base(bench), id, reason: REASON, replacement };
  correctMove(asLead(bench, input), input);
};

const DAY = (at: Instant) => new Date(at).toISOString().slice(0, 10) as never;

function loadOf(bench: Bench) {
  const { random, shed } = bench;
  const from = random.chance(0.5) ? lot(bench, 20) : undefined;
  const [bin] = rows<{ grams: number }>(
    bench,
    `select b.grams from balances b join holders h on h.id = b.holder_id where h.kind = 'reject-bin'`,
  );
  const grams = from?.grams ?? bin?.grams ?? 0;
  if (grams < 10) return null;
  return {
    destinationId: random.chance(0.5) ? bench.destinations.disposed : bench.destinations.passedOn,
    day: DAY(bench.now),
    noteNumber: "",
    taking: {
      how: "weighed" as const,
      scaleId: shed.scaleId,
      loads: [
        {
          lotNumber: from?.number ?? null,
          whole: random.chance(0.4),
          readings: [onPan(shown(grams * (0.3 + random.next() * 0.72)))],
        },
      ],
    },
  };
}

const remove: Act = (bench) => {
  const load = loadOf(bench);
  if (!load) return;
  const input = { ...base(bench), ...load, confirmedAbove: true };
  takeAway(asLead(bench, input), input);
};

const correctARemoval: Act = (bench) => {
  const id = any<"removal">(bench, "removals");
  if (!id) return;
  const input = {
    ...base(bench),
    id,
    reason: REASON,
    replacement: bench.random.chance(0.3) ? null : loadOf(bench),
  };
  correctRemoval(asLead(bench, input), input);
};

const receipt: Act = (bench) => {
  const found = pickRow<{ id: Id<"removal">; grams: number }>(
    bench,
    "select id, grams from removals where route = 'passed-on' and state = 'posted'",
  );
  if (!found) return;
  const input = {
    ...base(bench),
    id: found.id,
    number: `R-${bench.random.int(1_000_000)}`,
    day: DAY(bench.now),
    receivedGrams: found.grams,
  };
  enterReceipt(asLead(bench, input), input);
};

const undoAReceipt: Act = (bench) => {
  const found = pickRow<{ id: Id<"removal">; receiptId: Id<"removal-receipt"> }>(
    bench,
    "select removal_id as id, id as receiptId from removal_receipts where state = 'posted'",
  );
  if (!found) return;
  const input = { ...base(bench), ...found };
  undoReceipt(asLead(bench, input), input);
};

/** Each act with how often it comes. */
export const ACTS: readonly (readonly [name: string, act: Act, weight: number])[] = [
  ["weigh", weigh, 16],
  ["sort", sort, 14],
  ["undo a sorting", undoSort, 3],
  ["correct a sorting", correctSort, 4],
  ["correct a weigh-in", correctWeighing, 4],
  ["step", step, 10],
  ["undo a step", undoOf<"step">("steps", undoStep), 5],
  ["correct a step", correctAStep, 4],
  ["count", count, 7],
  ["undo a count", undoOf<"count">("counts", undoCount, asVolunteer), 4],
  ["correct a count", correctACount, 3],
  ["split", split, 4],
  ["merge", merge, 4],
  ["undo a move", undoOf<"lot-move">("lot_moves", undoMove), 5],
  ["correct a move", correctAMove, 3],
  ["take away", remove, 6],
  ["undo a removal", undoOf<"removal">("removals", undoRemoval), 5],
  ["correct a removal", correctARemoval, 3],
  ["receipt", receipt, 5],
  ["undo a receipt", undoAReceipt, 5],
];

/** Some minutes later: undo is over after ten. */
export function later(now: Instant, random: Random): Instant {
  return instant(Math.max(NOON, now) + (random.chance(0.1) ? 900_000 : 20_000));
}
