/**
 * Random work in a stock room, through the commands: whatever is counted, moved, identified, washed, dried, shredded,
 * undone and corrected, the ledger stays sound and every lot at or above zero.
 */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { countLot } from "@/lib/stock/commands/count-lot";
import { correctMove } from "@/lib/stock/commands/correct-move";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { identifyLot, mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import { correctCount } from "@/lib/stock/commands/review-count";
import { saveStep } from "@/lib/stock/commands/save-step";
import { undoCount } from "@/lib/stock/commands/undo-count";
import { undoMove } from "@/lib/stock/commands/undo-move";
import { undoStep } from "@/lib/stock/commands/undo-step";
import { saveStepSchema } from "@/lib/stock/contract/steps";
import { newScheme, NOON } from "../../support/scheme";
import { onFineScale, stockRoom, type StockRoom } from "../../support/stock-room";

const WORK = [
  "fill",
  "count",
  "empty",
  "merge",
  "split",
  "identify",
  "step",
  "undo",
  "correct",
] as const;
const action = fc.record({
  work: fc.constantFrom(...WORK),
  pick: fc.nat(1000),
  other: fc.nat(1000),
  grams: fc.integer({ min: 1, max: 3000 }),
  share: fc.double({ min: 0.5, max: 1.4, noNaN: true }),
  late: fc.boolean(),
});
type Action = typeof action extends fc.Arbitrary<infer A> ? A : never;

const COLOURS = ["blue", "white"];
const POLYMERS = ["PE-HD", "PP", "not-sure"] as const;

type Recorded = { kind: "count" | "move" | "step"; id: string };

function work(room: StockRoom, done: Recorded[], act: Action, now: number): void {
  const at = instant(now);
  const ctx = (body: unknown) => room.ctx("coordinator", at, body);
  const lots = room.db.reader.client
    .prepare("select number from lots order by number")
    .pluck()
    .all() as number[];
  const number = lots[act.pick % Math.max(lots.length, 1)] ?? 0;
  const base = { requestId: newId(now), occurredAt: at, count: { found: "empty" as const } };
  const taken = { how: "taken" as const, all: act.late, ...room.weighed(act.grams) };
  switch (act.work) {
    case "fill":
      room.fill(
        act.grams,
        { colour: COLOURS[act.pick % 2] ?? "blue", polymer: POLYMERS[act.other % 3] ?? "PP" },
        act.pick % 3,
        at,
      );
      return;
    case "count":
    case "empty": {
      const input = {
        ...base,
        number,
        seen: room.seen(number),
        confirmed: false,
        counted:
          act.work === "empty"
            ? { found: "empty" as const }
            : { found: "weighed" as const, ...room.weighed(act.grams) },
      };
      done.push({ kind: "count", id: countLot(ctx(input), input).countId });
      return;
    }
    case "merge": {
      const toNumber = lots[act.other % lots.length] ?? 0;
      const input = { ...base, number, toNumber, amount: taken };
      done.push({ kind: "move", id: mergeLot(ctx(input), input).moveId });
      return;
    }
    case "split": {
      const input = { ...base, number, place: "", amount: room.weighed(act.grams) };
      done.push({ kind: "move", id: splitLot(ctx(input), input).moveId });
      return;
    }
    case "identify": {
      const input = {
        ...base,
        number,
        polymer: "PP" as const,
        kind: "lids" as const,
        colourCode: "blue",
        method: "code" as const,
        amount: taken,
      };
      done.push({ kind: "move", id: identifyLot(ctx(input), input).moveId });
      return;
    }
    case "step": {
      const input = stepOf(room, base.requestId, at, number, act);
      done.push({ kind: "step", id: saveStep(ctx(input), input).stepId });
      return;
    }
    case "undo":
    case "correct": {
      const record = done[act.other % Math.max(done.length, 1)];
      if (record) takeBack(room, record, act, now);
    }
  }
}

function stepOf(room: StockRoom, requestId: string, at: number, number: number, act: Action) {
  return saveStepSchema.parse({
    requestId,
    kind: (["washing", "drying", "shredding"] as const)[act.other % 3],
    occurredAt: at,
    inputs: [
      act.late
        ? { number, amount: { how: "all" } }
        : {
            number,
            amount: { how: "taken", ...room.weighed(act.grams) },
            count: { found: "empty" },
          },
    ],
    outputs: [
      {
        scaleId: room.scaleId,
        reading: onFineScale(Math.max(1, Math.round(act.grams * act.share))),
      },
    ],
    cause: "dust",
    confirmed: true,
  });
}

function takeBack(room: StockRoom, { kind, id }: Recorded, act: Action, now: number): void {
  const requestId = newId(now);
  const ctx = room.ctx("coordinator", instant(now), requestId);
  const reason = "It was not so";
  if (act.work === "undo") {
    if (kind === "count") undoCount(ctx, { requestId, id: id as never });
    if (kind === "move") undoMove(ctx, { requestId, id: id as never });
    if (kind === "step") undoStep(ctx, { requestId, id: id as never });
    return;
  }
  const input = { requestId, id: id as never, reason };
  if (kind === "count") {
    const replacement = act.late ? null : { found: "weighed" as const, ...room.weighed(act.grams) };
    correctCount(ctx, { ...input, replacement });
  }
  if (kind === "move") {
    const replacement = act.late ? null : { grams: act.grams, toNumber: null, identity: null };
    correctMove(ctx, { ...input, replacement });
  }
  if (kind === "step") {
    const lot = room.db.reader.client
      .prepare(
        "select l.number from step_inputs i join lots l on l.id = i.lot_id where i.step_id = ?",
      )
      .pluck()
      .get(id) as number;
    const { requestId: _id, ...content } = stepOf(room, requestId, now, lot, act);
    const [first] = content.inputs;
    const replacement =
      act.late || !first
        ? null
        : {
            ...content,
            inputs: [{ ...first, amount: { how: "stated" as const, grams: act.grams } }],
          };
    correctStep(ctx, { ...input, replacement });
  }
}

describe("random work in a stock room", () => {
  it("keeps the ledger sound, whatever is done and taken back", () => {
    let saved = 0;
    let refused = 0;
    fc.assert(
      fc.property(fc.array(action, { minLength: 12, maxLength: 30 }), (actions) => {
        const room = stockRoom(newScheme());
        try {
          const done: Recorded[] = [];
          room.fill(2500, { polymer: "not-sure" });
          room.fill(2500);
          actions.forEach((act, at) => {
            try {
              work(room, done, act, NOON + at * 1000);
              saved += 1;
            } catch (error) {
              // A refusal is part of the work and must leave nothing behind; anything else is a mistake.
              if (!(error instanceof AppError) || error.code === "ledger-unbalanced") throw error;
              refused += 1;
            }
          });
          const found = verifyLedger(room.db.reader);
          expect(found.problem).toBeNull();
          const below = room.db.reader.client
            .prepare("select count(*) from balances where grams < 0")
            .pluck()
            .get();
          expect(below).toBe(0);
          const sum = room.db.reader.client
            .prepare(
              "select sum(held) - sum(collected) + sum(loss) + sum(difference) from totals_month",
            )
            .pluck()
            .get();
          expect(sum).toBe(0);
        } finally {
          room.close();
        }
      }),
      { numRuns: 25 },
    );
    expect(saved).toBeGreaterThan(refused / 2);
    expect(saved).toBeGreaterThan(150);
  }, 120_000);
});
