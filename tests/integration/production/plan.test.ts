/** Saving a plan as a run, changing it, calling it off. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError, type ErrorCode } from "@/lib/core/errors";
import { newId, type Id } from "@/lib/core/ids";
import { sentence } from "@/lib/core/messages";
import { weighPieces } from "@/lib/production/commands/pieces";
import { callOffRun, changePlan, planRun } from "@/lib/production/commands/plan-run";
import {
  callOffRunEndpoint,
  changePlanEndpoint,
  type PlanData,
  type RunReceipt,
} from "@/lib/production/contract/plans";
import { getRunPage, listRuns } from "@/lib/production/queries/runs";
import type { RunState } from "@/lib/production/terms";
import { commandCases, refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { rows } from "../../support/stock-work";
import {
  DRY_FLAKE,
  HOOKS_GRAMS,
  newWorkshop,
  workshop,
  type Workshop,
} from "../../support/workshop";

let shop: Workshop;
beforeEach(() => {
  shop = newWorkshop();
});
afterEach(() => shop.close());

type PlanInput = ReturnType<Workshop["planOf"]>;
type ChangeInput = PlanInput & { runId: Id<"run"> };
type OffInput = { requestId: string; runId: Id<"run"> };

const share = (colourCode: string, thousandths: number) => ({ colourCode, thousandths });
const setState = (of: Workshop, run: RunReceipt, state: RunState) =>
  of.db.writer.client.prepare("update runs set state = ? where id = ?").run(state, run.id);
const changeOf = (of: Workshop, run: RunReceipt, more: Partial<PlanData> = {}): ChangeInput =>
  changePlanEndpoint.input.parse({ ...of.planOf(more), runId: run.id });
const offOf = (run: RunReceipt): OffInput =>
  callOffRunEndpoint.input.parse({ requestId: newId(NOON), runId: run.id });
const page = (of: Workshop, number = 1) => {
  const found = getRunPage(of.ctx("volunteer"), number);
  if (!found) throw new Error(`no run ${number}`);
  return found;
};

describe("planning a run", () => {
  commandCases<PlanInput, PlanInput, RunReceipt>({
    command: planRun,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) =>
      workshop(scheme).planOf({ shares: [share("blue", 700), share("white", 300)] }),
    does: (scheme, answer, input) => {
      expect(answer).toEqual({ id: input.requestId, number: 1 });
      expect(rows(scheme, "select state, need_grams, planned_shots, planned_s from runs")).toEqual([
        { state: "planned", need_grams: HOOKS_GRAMS, planned_shots: 20, planned_s: 105 * 60 },
      ]);
      expect(
        rows(scheme, "select colour_code, thousandths, grams from run_colours order by 1"),
      ).toEqual([
        { colour_code: "blue", thousandths: 700, grams: 823 },
        { colour_code: "white", thousandths: 300, grams: 353 },
      ]);
      expect(rows(scheme, "select count(*) as n from labels where kind = 'run'")).toEqual([
        { n: 1 },
      ]);
      expect(rows(scheme, "select count(*) as n from entries")).toEqual([{ n: 0 }]);
    },
    wrongState: (scheme) => ({
      input: workshop(scheme).planOf({ pieceId: newId() }),
      code: "not-found",
    }),
    action: "runs.plan",
  });

  it("numbers runs in their order and shows them as they were planned, newest first", () => {
    shop.plan();
    shop.plan({ wantedPieces: 7, polymer: "PP", shares: [share("white", 1000)] });
    const { runs, next } = listRuns(shop.ctx("volunteer"), {});
    expect(runs.map((run) => [run.number, run.pieceName, run.polymer, run.needGrams])).toEqual([
      [2, "Coat hook", "PP", Math.ceil(4 * 56.3 + 50)],
      [1, "Coat hook", "PE-HD", HOOKS_GRAMS],
    ]);
    expect(next).toBeNull();
    expect(page(shop)).toMatchObject({
      run: { number: 1, reservedGrams: 0, shortGrams: 0, colours: [{ name: "Blue", grams: 1176 }] },
      plan: { wantedPieces: 40, shares: [share("blue", 1000)], folded: 30, seed: 7 },
      plannedByName: "Test lead",
      plannedShots: 20,
      reservations: [],
    });
    expect(page(shop).labelCode).toMatch(/^[0-9A-Z]{8}$/);
    expect(getRunPage(shop.ctx("volunteer"), 3)).toBeNull();
  });

  it("lists by state, and page by page", () => {
    const first = shop.plan();
    for (let at = 0; at < 51; at += 1) shop.plan();
    setState(shop, first, "called-off");
    const list = (input: Parameters<typeof listRuns>[1]) => listRuns(shop.ctx("lead"), input);
    const newest = list({});
    expect(newest.runs).toHaveLength(50);
    expect(newest.next).toBe(3);
    expect(list({ after: 3 }).runs.map(({ number }) => number)).toEqual([2, 1]);
    expect(list({ state: "called-off" }).runs.map(({ number }) => number)).toEqual([1]);
    expect(refusalOf(() => listRuns(shop.ctx("donor"), {}))).toBe("forbidden");
  });

  it("plans presses and cuts, and uses pieces that were weighed", () => {
    shop.plan({ pieceId: shop.sheetId, toolId: null, machineId: shop.pressId, wantedPieces: 1 });
    expect(page(shop).run).toMatchObject({ method: "pressing", needGrams: 151 });
    shop.plan({ pieceId: shop.markerId, toolId: null, machineId: shop.sawId, wantedPieces: 30 });
    expect(page(shop, 2).run).toMatchObject({ method: "cutting", needGrams: 287 });
    const weighed = {
      requestId: newId(NOON),
      pieceId: shop.hookId,
      count: 10,
      milligrams: 250_000,
    };
    weighPieces(shop.ctx("lead", NOON, weighed), weighed);
    shop.plan();
    expect(page(shop, 3).run.needGrams).toBe(1136);
    expect(page(shop, 3).plannedShots).toBe(20);
    expect(page(shop, 2).plannedShots).toBeNull();
  });

  const REFUSED: [string, ErrorCode, (of: Workshop) => Partial<PlanData>, RegExp][] = [
    ["no such piece", "not-found", () => ({ pieceId: newId() }), /./],
    [
      "a polymer of another piece",
      "never-heated",
      () => ({ polymer: "PS" }),
      /^PS is never heated/,
    ],
    ["no machine", "plan-lacks", () => ({ machineId: null }), /a machine for this piece/],
    ["no tool", "plan-lacks", () => ({ toolId: null }), /a tool for this piece/],
    [
      "a machine of another method",
      "piece-of-another-method",
      (of) => ({ machineId: of.pressId }),
      /^Press does not do that: the piece is made by moulding/,
    ],
    [
      "a tool of another piece",
      "tool-of-another-piece",
      (of) => ({ pieceId: of.sheetId, machineId: of.pressId }),
      /^Hook mould makes another piece/,
    ],
    [
      "no colour of the palette",
      "plan-colour",
      () => ({ shares: [share("tartan", 1000)] }),
      /no colour of the palette/,
    ],
  ];
  it.each(REFUSED)("refuses %s", (_what, code, more, words) => {
    const before = rows(shop, "select count(*) as n from runs");
    const input = shop.planOf(more(shop));
    const problem = problemOf(() => planRun(shop.ctx("lead", NOON, input), input));
    expect(problem.code).toBe(code);
    expect(sentence(problem.code, problem.detail)).toMatch(words);
    expect(rows(shop, "select count(*) as n from runs")).toEqual(before);
  });

  it("refuses a shot that the barrel cannot give, one too small, and a sheet larger than the plate", () => {
    const change = (sql: string) => shop.db.writer.client.prepare(sql).run();
    const refused = (more: Partial<PlanData> = {}) => {
      const input = shop.planOf(more);
      const problem = problemOf(() => planRun(shop.ctx("lead", NOON, input), input));
      return sentence(problem.code, problem.detail);
    };
    change("update machines set barrel_mm3 = 80000 where method = 'moulding'");
    expect(refused()).toMatch(
      /^One shot takes 56\.3 g, and the barrel gives 54\.0 g\. Nothing was saved/,
    );
    change(
      "update machines set barrel_mm3 = 175000, least_shot_mg = 60000 where method = 'moulding'",
    );
    expect(refused()).toMatch(/^One shot takes 56\.3 g, less than the 60\.0 g/);
    change("update machines set plate_width_um = 199000 where method = 'pressing'");
    expect(refused({ pieceId: shop.sheetId, toolId: null, machineId: shop.pressId })).toMatch(
      /^The sheet does not fit/,
    );
    expect(rows(shop, "select count(*) as n from runs")).toEqual([{ n: 0 }]);
  });
});

function problemOf(call: () => unknown): AppError {
  try {
    call();
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("it was not refused");
}

describe("changing a plan", () => {
  commandCases<ChangeInput, ChangeInput, RunReceipt>({
    command: changePlan,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = workshop(scheme);
      return changeOf(of, of.plan(), {
        wantedPieces: 10,
        shares: [share("white", 500), share("red", 500)],
      });
    },
    does: (scheme, answer, input) => {
      expect(answer).toEqual({ id: input.runId, number: 1 });
      expect(rows(scheme, "select wanted_pieces, need_grams, planned_shots from runs")).toEqual([
        { wanted_pieces: 10, need_grams: Math.ceil(5 * 56.3 + 50), planned_shots: 5 },
      ]);
      expect(rows(scheme, "select colour_code, grams from run_colours order by 1")).toEqual([
        { colour_code: "red", grams: 166 },
        { colour_code: "white", grams: 166 },
      ]);
    },
    wrongState: (scheme) => {
      const of = workshop(scheme);
      const run = of.plan();
      setState(of, run, "open");
      return { input: changeOf(of, run), code: "run-not-planned" };
    },
    action: "runs.change-plan",
  });

  it("is refused while stock is reserved for it, and of a run that is not there", () => {
    shop.fill(500, DRY_FLAKE);
    const run = shop.plan();
    shop.reserve(run);
    const change = (input: ChangeInput) =>
      refusalOf(() => changePlan(shop.ctx("lead", NOON, input), input));
    expect(change(changeOf(shop, run, { wantedPieces: 2 }))).toBe("run-reserved");
    expect(change(changeOf(shop, { id: newId(), number: 9 }))).toBe("not-found");
    expect(page(shop).run.wantedPieces).toBe(40);
  });

  it("is refused by the same rules as a new plan, and keeps the old one", () => {
    const run = shop.plan();
    const input = changeOf(shop, run, { toolId: null });
    expect(refusalOf(() => changePlan(shop.ctx("lead", NOON, input), input))).toBe("plan-lacks");
    expect(page(shop).plan.toolId).toBe(shop.toolId);
    expect(page(shop).run.colours).toHaveLength(1);
  });
});

describe("calling a run off", () => {
  commandCases<OffInput, OffInput, RunReceipt>({
    command: callOffRun,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = workshop(scheme);
      of.fill(5000, DRY_FLAKE);
      const run = of.plan();
      of.reserve(run);
      return offOf(run);
    },
    does: (scheme, answer, input) => {
      expect(answer).toEqual({ id: input.runId, number: 1 });
      expect(rows(scheme, "select state from runs")).toEqual([{ state: "called-off" }]);
      expect(rows(scheme, "select state, grams, ended_at from reservations")).toEqual([
        { state: "released", grams: HOOKS_GRAMS, ended_at: NOON },
      ]);
    },
    wrongState: (scheme) => {
      const of = workshop(scheme);
      const run = of.plan();
      setState(of, run, "called-off");
      return { input: offOf(run), code: "run-not-planned" };
    },
    action: "runs.call-off",
  });

  it("gives its stock to whoever asks next", () => {
    shop.fill(HOOKS_GRAMS, DRY_FLAKE);
    const [first, second] = [shop.plan(), shop.plan()];
    shop.reserve(first);
    expect(refusalOf(() => shop.reserve(second))).toBe("nothing-free");
    const input = offOf(first);
    callOffRun(shop.ctx("coordinator", NOON, input), input);
    expect(shop.reserve(second).grams).toBe(HOOKS_GRAMS);
    expect(refusalOf(() => shop.reserve(first))).toBe("run-not-planned");
  });
});
