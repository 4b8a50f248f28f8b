import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { saveStep } from "@/lib/stock/commands/save-step";
import { undoStep } from "@/lib/stock/commands/undo-step";
import type { CorrectStepInput } from "@/lib/stock/contract/steps";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { getStep } from "@/lib/stock/queries/steps";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { all, example, out, rows, save, step } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

describe("undoing a step", () => {
  const undo = (id: Id<"step">) => ({ requestId: newId(NOON), id });
  const saved = (of: StockRoom) => saveStep(of.ctx("lead"), example(of)).stepId;
  commandCases({
    command: undoStep,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => undo(saved(stockRoom(scheme))),
    does: (scheme) => {
      expect(
        rows(
          scheme,
          "select l.number, b.grams, l.closed_for from balances b join lots l on l.holder_id = b.holder_id order by l.number",
        ),
      ).toEqual([
        { number: 1, grams: 3160, closed_for: null },
        { number: 2, grams: 0, closed_for: null },
      ]);
      expect(
        rows(scheme, "select sum(loss) as loss, sum(difference) as difference from totals_month"),
      ).toEqual([{ loss: 0, difference: 0 }]);
    },
    wrongState: (scheme) => {
      const id = saved(stockRoom(scheme));
      undoStep(scheme.ctx("lead"), undo(id));
      return { input: undo(id), code: "undone-already" };
    },
    action: "steps.undo",
  });

  it("is for whoever saved it, in time, and not once the flake was used", () => {
    const id = saved(room);
    expect(refusalOf(() => undoStep(room.ctx("coordinator"), undo(id)))).toBe("undo-not-yours");
    const late = room.ctx("lead", instant(NOON + 600_001));
    expect(refusalOf(() => undoStep(late, undo(id)))).toBe("undo-too-late");
    save(room, { kind: "washing", inputs: [all(2)], outputs: [out(room, 3151)] });
    expect(refusalOf(() => undoStep(room.ctx("lead"), undo(id)))).toBe("undo-used-since");
    expect(getStep(room.ctx("lead"), id)?.undoUntil).toBe(NOON + 600_000);
    expect(getStep(room.ctx("coordinator"), id)?.undoUntil).toBeNull();
  });

  it("leaves the next lot that opened meanwhile alone", () => {
    const id = saved(room);
    const next = room.fill(70);
    undoStep(room.ctx("lead"), undo(id));
    expect(getLotRecord(room.db.reader, 1)).toMatchObject({ closedFor: "step" });
    expect([room.held(1), room.held(next)]).toEqual([3160, 70]);
  });
});

describe("correcting a step", () => {
  const saved = (of: StockRoom) => saveStep(of.ctx("lead"), example(of)).stepId;
  const correct = (of: StockRoom, id: Id<"step">, more: object | null): CorrectStepInput => {
    if (more === null) {
      return { requestId: newId(NOON), id, reason: "Never happened", replacement: null };
    }
    const { requestId, ...replacement } = step(of, more);
    return { requestId, id, reason: "The dust was weighed twice", replacement };
  };
  const put = (of: StockRoom) => ({
    inputs: [{ number: 1, amount: { how: "stated", grams: 3100 } }],
    outputs: [out(of, 3090)],
    losses: [{ cause: "dust", grams: 10 }],
  });
  commandCases({
    command: correctStep,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => {
      const of = stockRoom(scheme);
      return correct(of, saved(of), put(of));
    },
    does: (scheme, answer, input) => {
      expect(answer).toMatchObject({ replacementId: input.requestId, later: { count: 0 } });
      expect(
        rows(
          scheme,
          "select state, input_grams, output_grams, corrects from steps order by corrects",
        ),
      ).toEqual([
        { state: "corrected", input_grams: 3160, output_grams: 3151, corrects: null },
        { state: "posted", input_grams: 3100, output_grams: 3090, corrects: input.id },
      ]);
      expect(
        rows(
          scheme,
          "select l.number, b.grams from balances b join lots l on l.holder_id = b.holder_id order by l.number",
        ),
      ).toEqual([
        { number: 1, grams: 60 },
        { number: 2, grams: 3090 },
      ]);
      expect(getStep(scheme.ctx("volunteer"), input.id)?.correction).toMatchObject({
        reason: "The dust was weighed twice",
        byName: "Test coordinator",
      });
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const id = saved(of);
      correctStep(of.ctx("lead"), correct(of, id, null));
      return { input: correct(of, id, put(of)), code: "corrected-already" };
    },
    action: "steps.correct",
  });

  it("goes through when the flake is gone, names who used it, and settles what is short", () => {
    const id = saved(room);
    const washed = save(room, { kind: "washing", inputs: [all(2)], outputs: [out(room, 3151)] });
    const input = correct(room, id, put(room));
    const answer = correctStep(room.ctx("lead", NOON, input), input);
    expect(answer.later).toMatchObject({
      count: 1,
      uses: [{ kind: "step", subject: `step:${washed.stepId}`, grams: 3151 }],
    });
    expect(room.held(2)).toBe(0);
    expect(rows(room, "select kind from entries order by id desc limit 1")).toEqual([
      { kind: "settling" },
    ]);
  });

  it("may say that all of it was what it took then, and only of its own lots", () => {
    const id = saved(room);
    const again = correct(room, id, { inputs: [all(1)], outputs: [out(room, 3158)] });
    correctStep(room.ctx("lead", NOON, again), again);
    expect(room.held(2)).toBe(3158);
    const other = room.fill(10, { colour: "white" });
    const wrong = correct(room, again.requestId as Id<"step">, {
      inputs: [all(other)],
      outputs: [out(room, 10)],
    });
    expect(refusalOf(() => correctStep(room.ctx("lead"), wrong))).toBe("lot-empty");
  });

  it("can only take it back, and is not undone", () => {
    const id = saved(room);
    const input = correct(room, id, null);
    expect(correctStep(room.ctx("lead", NOON, input), input).replacementId).toBeNull();
    expect([room.held(1), room.held(2)]).toEqual([3160, 0]);
    expect(refusalOf(() => undoStep(room.ctx("lead"), { requestId: newId(), id }))).toBe(
      "corrected-already",
    );
  });
});
