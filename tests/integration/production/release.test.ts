/** Giving reserved stock back, and prolonging. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { prolong, release } from "@/lib/production/commands/reserve";
import { prolongEndpoint, releaseEndpoint } from "@/lib/production/contract/reservations";
import type { RunReceipt } from "@/lib/production/contract/plans";
import { commandCases, refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { rows } from "../../support/stock-work";
import {
  about,
  DRY_FLAKE,
  HOOKS_GRAMS,
  newWorkshop,
  workshop,
  type Workshop,
} from "../../support/workshop";

const DAY = 24 * 60 * 60 * 1000;

let shop: Workshop;
beforeEach(() => {
  shop = newWorkshop();
});
afterEach(() => shop.close());

type ReleaseInput = ReturnType<(typeof releaseEndpoint.input)["parse"]>;
type ProlongInput = ReturnType<(typeof prolongEndpoint.input)["parse"]>;

const off = (of: Workshop, run: RunReceipt) =>
  of.db.writer.client.prepare("update runs set state = 'called-off' where id = ?").run(run.id);
describe("giving back", () => {
  commandCases<ReleaseInput, ReleaseInput, { number: number; releasedGrams: number }>({
    command: release,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = workshop(scheme);
      of.fill(5000, DRY_FLAKE);
      const run = of.plan();
      of.reserve(run);
      return releaseEndpoint.input.parse(about(run));
    },
    does: (scheme, answer) => {
      expect(answer).toEqual({ number: 1, releasedGrams: HOOKS_GRAMS });
      expect(rows(scheme, "select state, ended_at from reservations")).toEqual([
        { state: "released", ended_at: NOON },
      ]);
    },
    wrongState: (scheme) => {
      const of = workshop(scheme);
      const run = of.plan();
      off(of, run);
      return { input: about(run), code: "run-not-planned" };
    },
    action: "runs.release",
  });

  it("of one lot leaves the others, and of another run's takes nothing", () => {
    const [first, second] = [shop.fillAnother(600), shop.fillAnother(900, "blue", 1)];
    const [run, other] = [shop.plan(), shop.plan()];
    shop.reserve(run);
    shop.reserve(other);
    const [mine] = shop.promised(first);
    const give = (of: RunReceipt, reservationId?: Id<"reservation">) => {
      const input = about(of, reservationId ? { reservationId } : {});
      return release(shop.ctx("lead", NOON, input), input).releasedGrams;
    };
    expect(give(other, mine?.id)).toBe(0);
    expect(give(run, mine?.id)).toBe(600);
    expect(shop.shorts(first)).toEqual([]);
    expect(shop.shorts(second)).toEqual([
      [576, 0],
      [324, 0],
    ]);
    expect(shop.reserve(other).picks).toEqual([{ number: first, grams: 600 }]);
    expect(give(run)).toBe(576);
    expect(give(run)).toBe(0);
    expect(refusalOf(() => give({ id: newId(), number: 9 }))).toBe("not-found");
  });
});

describe("prolonging", () => {
  commandCases<ProlongInput, ProlongInput, { number: number; lapsesAt: number }>({
    command: prolong,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = workshop(scheme);
      of.db.writer.client.prepare("update scheme_limits set reservation_days = 5").run();
      of.fill(5000, DRY_FLAKE);
      const run = of.plan();
      of.reserve(run, undefined, instant(NOON - DAY));
      return prolongEndpoint.input.parse(about(run));
    },
    does: (scheme, answer) => {
      expect(answer).toEqual({ number: 1, lapsesAt: NOON + 5 * DAY });
      expect(rows(scheme, "select lapses_at, warned_at, state from reservations")).toEqual([
        { lapses_at: NOON + 5 * DAY, warned_at: null, state: "held" },
      ]);
    },
    wrongState: (scheme) => {
      const of = workshop(scheme);
      return { input: about(of.plan()), code: "nothing-reserved" };
    },
    action: "runs.prolong",
  });

  it("is refused of a run that is no plan any more, or not there", () => {
    shop.fill(5000, DRY_FLAKE);
    const run = shop.plan();
    shop.reserve(run);
    off(shop, run);
    const of = (one: RunReceipt) => {
      const input = about(one);
      return refusalOf(() => prolong(shop.ctx("lead", NOON, input), input));
    };
    expect(of(run)).toBe("run-not-planned");
    expect(of({ id: newId(), number: 9 })).toBe("not-found");
  });
});
