/** Fifty runs that want the same lot: exactly what is free is promised, whoever asks, and the rest is refused. */
import { spawn, type ChildProcess } from "node:child_process";
import { once } from "node:events";
import path from "node:path";
import { createInterface } from "node:readline";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { sentence } from "@/lib/core/messages";
import type { RunReceipt } from "@/lib/production/contract/plans";
import type { Answer } from "../../support/reserve-many";
import { NOON } from "../../support/scheme";
import { rows } from "../../support/stock-work";
import { DRY_FLAKE, HOOKS_GRAMS, newWorkshop, type Workshop } from "../../support/workshop";

const FREE = 30_000;
/** 25 runs are covered in full, one gets what is left, the rest nothing. */
const FULL = Math.floor(FREE / HOOKS_GRAMS);
const REST = FREE - FULL * HOOKS_GRAMS;
const ROOT = path.resolve(import.meta.dirname, "../../..");

let shop: Workshop;
let lot: number;
let runs: RunReceipt[];
beforeEach(() => {
  shop = newWorkshop();
  lot = shop.fill(FREE, DRY_FLAKE);
  runs = Array.from({ length: 50 }, () => shop.plan());
});
const children: ChildProcess[] = [];
afterEach(() => {
  for (const child of children.splice(0)) child.kill();
  shop.close();
});

const promisedGrams = () =>
  rows(shop, "select sum(grams) as grams, count(*) as n from reservations where state = 'held'");

describe("fifty reservations of one lot", () => {
  it("promise exactly what is free, oldest first, and refuse the rest clearly", () => {
    const answers = runs.map((run) => {
      try {
        return shop.reserve(run).grams;
      } catch (error) {
        if (!(error instanceof AppError)) throw error;
        return sentence(error.code, error.detail);
      }
    });
    expect(answers.slice(0, FULL)).toEqual(Array.from({ length: FULL }, () => HOOKS_GRAMS));
    expect(answers[FULL]).toBe(REST);
    expect(new Set(answers.slice(FULL + 1))).toEqual(
      new Set([
        "No lot has any of these colours free. Nothing was reserved; change the blend or look again later.",
      ]),
    );
    expect(promisedGrams()).toEqual([{ grams: FREE, n: FULL + 1 }]);
    expect(shop.promised(lot).every(({ shortGrams }) => shortGrams === 0)).toBe(true);
  });

  it("by hand are promised in full or refused with what is free", () => {
    const refused: string[] = [];
    for (const run of runs) {
      try {
        shop.reserve(run, [{ number: lot, grams: HOOKS_GRAMS }]);
      } catch (error) {
        if (!(error instanceof AppError)) throw error;
        refused.push(sentence(error.code, error.detail));
      }
    }
    expect(refused).toHaveLength(50 - FULL);
    expect(new Set(refused)).toEqual(
      new Set([
        "Lot 1 has 0.600 kg free now, not 1.176 kg. Nothing was reserved; take what is free or choose another lot.",
      ]),
    );
    expect(promisedGrams()).toEqual([{ grams: FULL * HOOKS_GRAMS, n: FULL }]);
  });

  it("from two processes at once promise exactly what is free", async () => {
    const start = (ids: string[]) => {
      const args = [
        "--conditions=react-server",
        "--import",
        "tsx",
        "tests/support/reserve-many.ts",
      ];
      const child = spawn(
        process.execPath,
        [...args, shop.db.file, shop.people.lead, String(NOON), ...ids],
        { cwd: ROOT, stdio: ["pipe", "pipe", "inherit"] },
      );
      children.push(child);
      const lines = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
      const next = async () => {
        const line = await lines.next();
        if (line.done) throw new Error("it ended without an answer");
        return line.value;
      };
      return { child, next };
    };
    const ids = runs.map(({ id }) => id);
    const both = [start(ids.slice(0, 25)), start(ids.slice(25))];
    for (const one of both) expect(await one.next()).toBe("ready");
    const ends = both.map(({ child }) => once(child, "exit"));
    for (const { child } of both) child.stdin.end("go\n");
    const answers = await Promise.all(
      both.map(async ({ next }) => JSON.parse(await next()) as Answer[]),
    );
    expect(await Promise.all(ends)).toEqual([
      [0, null],
      [0, null],
    ]);
    const all = answers.flat();
    const granted = all.flatMap((answer) => ("grams" in answer ? [answer.grams] : []));
    expect(granted.filter((grams) => grams === HOOKS_GRAMS)).toHaveLength(FULL);
    expect(granted.filter((grams) => grams !== HOOKS_GRAMS)).toEqual([REST]);
    expect(
      all.filter((answer) => "refused" in answer && answer.refused === "nothing-free"),
    ).toHaveLength(50 - FULL - 1);
    expect(promisedGrams()).toEqual([{ grams: FREE, n: FULL + 1 }]);
  });
});
