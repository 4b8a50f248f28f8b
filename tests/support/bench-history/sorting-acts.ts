/** Weighing and sorting in a random history, and what corrects them. */
import { newId } from "@/lib/core/ids";
import { closeSorting } from "@/lib/sorting/commands/close";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { correctWeighIn } from "@/lib/weighing/commands/correct";
import { getStoredWeighIn } from "@/lib/weighing/queries/stored";
import type { Random } from "@/db/seed/random";
import { onPan, sorting, type WeighedIn } from "../shed";

import {
  asLead,
  asVolunteer,
  base,
  any,
  latest,
  rows,
  shown,
  within,
  REASON,
  type Act,
} from "./desk";
export const weigh: Act = ({ shed, random }) => {
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

export const sort: Act = (bench) => {
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

export const undoSort: Act = (bench) => {
  const id = latest<"sorting">(bench, "sorting_sessions", "closed");
  if (!id) return;
  const input = { ...base(bench), id };
  undoSorting(asVolunteer(bench, input), input);
};

export const correctSort: Act = (bench) => {
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

export const correctWeighing: Act = (bench) => {
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
