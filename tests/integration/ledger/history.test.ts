/**
 * Random histories against the plain model: whatever is posted, undone and corrected, on whatever day,
 * every balance, composition, total and report row is what an array of movements says.
 *
 * BISMAR_HISTORIES sets how many histories each seed gives; BISMAR_SHRINK=1 looks for the smallest failure.
 */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { expectSame } from "@/tests/support/ledger-history/comparison";
import { someDay } from "@/tests/support/ledger-history/lines";
import { histories, perform, type Operation } from "@/tests/support/ledger-history/operations";
import { Picks } from "@/tests/support/ledger-history/picks";
import { expectRowsClose } from "@/tests/support/ledger-history/report-rows";
import { newWorld, type World } from "@/tests/support/ledger-history/world";
import { shortHoldings } from "@/tests/support/plain-model/posting";
import { newScheme } from "@/tests/support/scheme";

const HISTORIES = Number(process.env.BISMAR_HISTORIES ?? 16);
const SHRINK = process.env.BISMAR_SHRINK === "1";
const FIXED_SEEDS = [20_261_201, 19_560_506, 271_828, 314_159];
const STEPS_BETWEEN_CHECKS = SHRINK ? 1 : 7;

/** How often the histories came to what they are for. */
const reached = {
  refusals: 0,
  settled: 0,
  settledInPartsOnly: 0,
  emptiedSince: 0,
  lateRecords: 0,
  heatedThreeTimes: 0,
  correctionsOfCorrections: 0,
};

function note({ book, acts, refusals }: World): void {
  reached.refusals += refusals;
  reached.lateRecords += book.entries.filter(({ day, trueDay }) => day !== trueDay).length;
  reached.heatedThreeTimes += book.movements.some((m) => m.dim === "H" && m.key === 3) ? 1 : 0;
  reached.correctionsOfCorrections += acts.filter((act) => act.corrections > 1).length;
  for (const { entry } of book.entries.filter(({ kind }) => kind === "settling")) {
    const moves = book.movements.filter((move) => move.entry === entry);
    reached.settled += 1;
    if (moves.some(({ account }) => account === "difference")) reached.emptiedSince += 1;
    else reached.settledInPartsOnly += 1;
  }
}

function check(world: World, picks: Picks): void {
  expectSame(world);
  expect(shortHoldings(world.book)).toEqual([]);
  const [from = "", until = ""] = [someDay(picks), someDay(picks)].sort();
  expectRowsClose(world, from, until);
  expectRowsClose(world, "2025-01-01", "2027-01-01");
  expect(verifyLedger(world.scheme.db.reader)).toMatchObject({ ok: true, problem: null });
}

function live(history: readonly Operation[]): void {
  const scheme = newScheme();
  const world = newWorld(scheme);
  try {
    history.forEach((operation, at) => {
      perform(world, operation);
      if (at % STEPS_BETWEEN_CHECKS === 0) expectSame(world);
    });
    check(world, new Picks(history.flatMap(({ numbers }) => numbers.slice(-1))));
    note(world);
  } catch (error) {
    const story = world.story.map((line, at) => `${at + 1}. ${line}`).join("\n");
    const message = error instanceof Error ? error.message : String(error);
    throw new Error(`${message}\n${story}`, { cause: error });
  } finally {
    scheme.close();
  }
}

/** Tells a failure as a story, instead of as the numbers that led to it. */
const storyteller: fc.Plugin<unknown> = () => ({
  onAllRunsComplete: ({ failed, seed, counterexamplePath, errorInstance }) => {
    if (!failed) return;
    const text = errorInstance instanceof Error ? errorInstance.message : String(errorInstance);
    throw new Error(`seed ${seed}, path ${counterexamplePath}: ${text}`, { cause: errorInstance });
  },
});

describe("random histories", () => {
  it.each([...FIXED_SEEDS, Date.now() % 2 ** 31])(
    "agree with the plain model (seed %i)",
    (seed) => {
      fc.assert(fc.property(histories, live), {
        seed,
        numRuns: HISTORIES,
        endOnFailure: !SHRINK,
        plugins: [storyteller, ...(SHRINK ? [fc.interruptAfterTimeLimit(50_000)] : [])],
      });
    },
  );

  it.skipIf(HISTORIES < 16)("came to what they are for", () => {
    for (const [what, times] of Object.entries(reached)) expect(times, what).toBeGreaterThan(0);
  });
});
