/**
 * Random plans, reservations, lapses, counts, steps and removals on the same lots: no gram is ever promised twice.
 * After each act everything that is said of promises is compared with a list that is kept beside it, oldest first.
 */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { tendReservations } from "@/lib/production/commands/lapse";
import { callOffRun } from "@/lib/production/commands/plan-run";
import { prolong, release } from "@/lib/production/commands/reserve";
import type { RunReceipt } from "@/lib/production/contract/plans";
import { countLot } from "@/lib/stock/commands/count-lot";
import { removalDesk } from "../../support/removal-desk";
import { NOON } from "../../support/scheme";
import { all, count, out, rows, save } from "../../support/stock-work";
import { DRY_FLAKE, newWorkshop } from "../../support/workshop";
import { checkPromises, lotsOf, promisedOf, sum, withoutShort, type World } from "./promised-list";

const HOUR = 60 * 60 * 1000;
/** A reservation stands for two days here, so that some lapse. */
const DAYS = 2;

const action = fc.record({
  work: fc.constantFrom(
    ...(["plan", "reserve", "reserve", "by-hand", "by-hand", "release", "release-one"] as const),
    ...(["call-off", "prolong", "tend", "fill", "count", "count", "step", "remove"] as const),
  ),
  run: fc.nat(20),
  lot: fc.nat(20),
  grams: fc.integer({ min: 1, max: 1500 }),
  hours: fc.nat(12),
});
type Action = typeof action extends fc.Arbitrary<infer A> ? A : never;

function reserveByItself(world: World, run: RunReceipt, at: Instant): void {
  const { shop } = world;
  const kept = withoutShort(world, run.id);
  const lots = lotsOf(world);
  const answer = shop.reserve(run, undefined, at);
  const need = rows(
    shop,
    "select colour_code as colour, grams from run_colours where run_id = ?",
    run.id,
  );
  for (const { colour, grams } of need as { colour: string; grams: number }[]) {
    const own = lots.filter((lot) => lot.usable && lot.colour === colour);
    const numbers = own.map(({ number }) => number);
    const lacks =
      grams - sum(kept.filter((one) => one.runId === run.id && numbers.includes(one.lot)));
    const free = numbers.map((number) =>
      Math.max(0, shop.held(number) - sum(promisedOf(kept, number))),
    );
    const picked = sum(answer.picks.filter(({ number }) => numbers.includes(number)));
    const most = free.reduce((of, one) => of + one, 0);
    expect(picked).toBe(Math.min(Math.max(0, lacks), most));
  }
  world.held = kept;
  keep(world, run, answer.picks, at);
}

/** Writes down what was promised: each lot had as much free. */
function keep(
  world: World,
  run: RunReceipt,
  picks: readonly { number: number; grams: number }[],
  at: Instant,
): void {
  for (const { number, grams } of picks) {
    const free = world.shop.held(number) - sum(promisedOf(world.held, number));
    expect(grams).toBeLessThanOrEqual(free);
    const lapsesAt = at + DAYS * 24 * HOUR;
    world.held.push({ runId: run.id, lot: number, grams, lapsesAt });
  }
}

/** Sends it again with the answer where it was asked whether reserved grams shall be taken; asked only where some are. */
function knowingly(world: World, number: number, send: (reservedToo: boolean) => unknown): void {
  try {
    send(false);
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== "lot-reserved") throw error;
    expect(promisedOf(world.held, number).length).toBeGreaterThan(0);
    send(true);
  }
}

function work(world: World, act: Action, at: Instant): void {
  const { shop, desk, runs } = world;
  const run = runs[act.run % Math.max(1, runs.length)];
  const lots = lotsOf(world);
  const number = lots[act.lot % lots.length]?.number ?? 0;
  const send = <T>(more: T) => ({ requestId: newId(at), ...more });
  const lead = (body: unknown) => shop.ctx("lead", at, body);
  const colour = act.lot % 3 === 0 ? "white" : "blue";
  switch (act.work) {
    case "plan": {
      const first = act.grams % 1001;
      const shares = [
        { colourCode: "blue", thousandths: first },
        { colourCode: "white", thousandths: 1000 - first },
      ].filter(({ thousandths }) => thousandths > 0);
      runs.push(shop.plan({ wantedPieces: (act.grams % 50) + 1, shares }, at));
      return;
    }
    case "fill":
      shop.fill(act.grams, { ...DRY_FLAKE, colour }, act.run % 3, at);
      return;
    case "count": {
      const found = act.grams < 100 ? "empty" : act.grams;
      const input = count(shop, number, found, { occurredAt: at });
      countLot(lead(input), input);
      return;
    }
    case "step":
      knowingly(world, number, (reservedToo) =>
        save(
          shop,
          {
            kind: act.run % 2 === 0 ? "shredding" : "drying",
            occurredAt: at,
            inputs: [
              act.grams % 2 === 0
                ? all(number)
                : { number, amount: { how: "taken", ...shop.weighed(act.grams) } },
            ],
            outputs: [out(shop, act.grams)],
            cause: "dust",
            confirmed: true,
            reservedToo,
          },
          at,
        ),
      );
      return;
    case "remove": {
      const input = desk.input({ grams: act.grams - (act.grams % 5) + 5, lot: number });
      knowingly(world, number, (reservedToo) => desk.takeSent({ ...input, reservedToo }, at));
      return;
    }
    case "tend":
      tendReservations(shop.ctx("system", at));
      world.held = world.held.filter(({ lapsesAt }) => lapsesAt > at);
      return;
    default:
  }
  if (!run) return;
  switch (act.work) {
    case "reserve":
      reserveByItself(world, run, at);
      return;
    case "by-hand": {
      const picks = [{ number, grams: act.grams }];
      shop.reserve(run, picks, at);
      keep(world, run, picks, at);
      return;
    }
    case "release":
    case "call-off": {
      const input = send({ runId: run.id });
      if (act.work === "release") {
        const { releasedGrams } = release(lead(input), input);
        expect(releasedGrams).toBe(sum(world.held.filter(({ runId }) => runId === run.id)));
      } else {
        callOffRun(lead(input), input);
      }
      world.held = world.held.filter(({ runId }) => runId !== run.id);
      return;
    }
    case "release-one": {
      const at0 = shop.promised(number).findIndex(({ runId }) => runId === run.id);
      const reservation = shop.promised(number)[at0];
      if (!reservation) return;
      const input = send({ runId: run.id, reservationId: reservation.id });
      expect(release(lead(input), input).releasedGrams).toBe(reservation.grams);
      const gone = promisedOf(world.held, number)[at0];
      world.held = world.held.filter((one) => one !== gone);
      return;
    }
    case "prolong": {
      const input = send({ runId: run.id });
      const { lapsesAt } = prolong(lead(input), input);
      world.held = world.held.map((one) => (one.runId === run.id ? { ...one, lapsesAt } : one));
      return;
    }
    default:
  }
}

describe("promises", () => {
  it("never promise a gram twice, whatever is planned, reserved, lapsed, counted, stepped and taken away", () => {
    const done = new Map<string, number>();
    let shortSeen = 0;
    fc.assert(
      fc.property(fc.array(action, { minLength: 15, maxLength: 35 }), (actions) => {
        const shop = newWorkshop();
        try {
          shop.db.writer.client.prepare("update scheme_limits set reservation_days = ?").run(DAYS);
          const desk = removalDesk(shop);
          shop.fill(2000, DRY_FLAKE);
          shop.fill(1500, { ...DRY_FLAKE, colour: "white" });
          const world: World = { shop, desk, runs: [shop.plan(), shop.plan()], held: [] };
          let now: number = NOON;
          for (const act of actions) {
            now += act.hours * HOUR + 1000;
            try {
              work(world, act, instant(now));
              done.set(act.work, (done.get(act.work) ?? 0) + 1);
            } catch (error) {
              // A refusal is part of the work and must leave nothing behind; anything else is a mistake.
              if (!(error instanceof AppError)) throw error;
            }
            if (checkPromises(world) > 0) shortSeen += 1;
          }
          expect(verifyLedger(shop.db.reader).problem).toBeNull();
        } finally {
          shop.close();
        }
      }),
      { numRuns: 25 },
    );
    // The test is worth nothing where hardly anything went through or nothing ever turned short.
    for (const { work: kind } of fc.sample(action, 200)) {
      expect(done.get(kind) ?? 0, kind).toBeGreaterThan(3);
    }
    expect(shortSeen).toBeGreaterThan(10);
  }, 120_000);
});
