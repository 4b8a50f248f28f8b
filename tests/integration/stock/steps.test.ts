import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId, type Id } from "@/lib/core/ids";
import { sentence } from "@/lib/core/messages";
import { instant } from "@/lib/core/time";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { saveStep } from "@/lib/stock/commands/save-step";
import { undoStep } from "@/lib/stock/commands/undo-step";
import {
  saveStepSchema,
  type CorrectStepInput,
  type SaveStepInput,
} from "@/lib/stock/contract/steps";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { listOwnLosses, ownLoss, OWN_LOSS_SQL } from "@/lib/stock/queries/own-loss";
import { getStep, listSteps, STEPS_SQL } from "@/lib/stock/queries/steps";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { onFineScale, stockRoom, type StockRoom } from "../../support/stock-room";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

type Sent = Parameters<(typeof saveStepSchema)["parse"]>[0];
const out = (of: StockRoom, grams: number, more: object = {}) => ({
  scaleId: of.scaleId,
  reading: onFineScale(grams),
  ...more,
});
const all = (number: number) => ({ number, amount: { how: "all" } });
const step = (of: StockRoom, more: object): SaveStepInput =>
  saveStepSchema.parse({
    requestId: newId(NOON),
    kind: "shredding",
    occurredAt: NOON,
    ...more,
  } satisfies Sent);
/** The ledger's worked example: 3160 g of two points to 3151 g of flake and 9 g of dust. */
const example = (of: StockRoom): SaveStepInput => {
  of.fill(2160, {}, 0);
  const number = of.fill(1000, {}, 1);
  return step(of, {
    minutes: 45,
    inputs: [all(number)],
    outputs: [out(of, 3151)],
    losses: [{ cause: "dust", grams: 9 }],
  });
};
const rows = (of: TestScheme, sql: string, ...values: unknown[]) =>
  of.db.reader.client.prepare(sql).all(...values);
const save = (of: StockRoom, more: object, at = NOON) => {
  const input = step(of, more);
  return saveStep(of.ctx("lead", at, input), input);
};
const refusal = (of: StockRoom, more: object) => refusalOf(() => save(of, more));
const lastLines = (of: TestScheme) =>
  rows(
    of,
    "select account, cause, grams from lines where entry_id = (select max(id) from entries) order by seq",
  );

describe("saving a step", () => {
  commandCases({
    command: saveStep,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => example(stockRoom(scheme)),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        kind: "shredding",
        inputGrams: 3160,
        outputGrams: 3151,
        lossGrams: 9,
        differenceGrams: 0,
        outputs: [{ number: 2, opened: true, grams: 3151, heldGrams: 3151 }],
        closed: [1],
      });
      expect(lastLines(scheme)).toEqual([
        { account: "lot", cause: null, grams: -3160 },
        { account: "lot", cause: null, grams: 3151 },
        { account: "loss", cause: "dust", grams: 9 },
      ]);
      // Worked in ledger.md: flake 2154 of A and 997 of B, dust 6 and 3.
      expect(
        rows(
          scheme,
          `select l.account, p.grams from line_parts p join lines l using (entry_id, seq)
            where p.dim = 'O' and p.entry_id = (select max(id) from entries) and l.grams > 0
            order by l.seq, p.key`,
        ),
      ).toEqual([
        { account: "lot", grams: 2154 },
        { account: "lot", grams: 997 },
        { account: "loss", grams: 6 },
        { account: "loss", grams: 3 },
      ]);
      expect(getLotRecord(scheme.db.reader, 1)).toMatchObject({ closedFor: "step" });
      expect(getLotRecord(scheme.db.reader, 2)).toMatchObject({
        polymer: "PE-HD",
        kind: "lids",
        colourCode: "blue",
        form: "flake",
        wash: "as-received",
      });
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const number = of.fill(500);
      return {
        input: step(of, {
          inputs: [{ number, amount: { how: "taken", ...of.weighed(900) } }],
          outputs: [out(of, 900)],
        }),
        code: "lot-holds-less",
      };
    },
    action: "steps.save",
  });

  it("weighs in, weighs back, and takes all: each closes its lot, and the next opens by itself", () => {
    const a = room.fill(2000);
    const b = room.fill(1000, { colour: "white" });
    const c = room.fill(500, { kind: "bottles" });
    const receipt = save(room, {
      inputs: [
        { number: a, amount: { how: "taken", ...room.weighed(700, 300) } },
        {
          number: b,
          amount: {
            how: "weighed-back",
            scaleId: room.scaleId,
            before: { ...onFineScale(1150), containerId: room.crateId },
            after: { ...onFineScale(550), containerId: room.crateId },
          },
        },
        all(c),
      ],
      outputs: [
        out(room, 1500, { kind: "lids", colourCode: "mixed" }),
        out(room, 590, { kind: "lids", colourCode: "mixed" }),
      ],
      cause: "dust",
    });
    expect(receipt).toMatchObject({ inputGrams: 2100, outputGrams: 2090, closed: [a, b, c] });
    expect([room.held(a), room.held(b), room.held(c)]).toEqual([1000, 400, 0]);
    expect(
      rows(room, "select grams, taking, gross_mg, less_mg from step_inputs order by grams desc"),
    ).toEqual([
      { grams: 1000, taking: "taken", gross_mg: 1_000_000, less_mg: 0 },
      { grams: 600, taking: "weighed-back", gross_mg: 1_000_000, less_mg: 400_000 },
      { grams: 500, taking: "taken", gross_mg: null, less_mg: null },
    ]);
    expect(room.fill(100)).toBe(a + 4);
  });

  it("posts the scale's doubt as difference, what is beyond it by its cause", () => {
    const within = save(room, { inputs: [all(room.fill(3160))], outputs: [out(room, 3158)] });
    expect(within).toMatchObject({ lossGrams: 0, differenceGrams: 2 });
    const of = { inputs: [all(room.fill(3160))], outputs: [out(room, 3100)] };
    expect(refusal(room, of)).toBe("step-beyond-tolerance");
    expect(save(room, { ...of, cause: "metal" })).toMatchObject({
      lossGrams: 60,
      differenceGrams: 0,
    });
    expect(rows(room, "select cause, grams from step_losses")).toEqual([
      { cause: "metal", grams: 60 },
    ]);
  });

  it("adds a rest to a cause that was named already", () => {
    save(room, {
      inputs: [all(room.fill(1000))],
      outputs: [out(room, 900)],
      losses: [
        { cause: "dust", grams: 40 },
        { cause: "metal", grams: 20 },
      ],
      cause: "dust",
    });
    expect(rows(room, "select cause, grams from step_losses order by cause")).toEqual([
      { cause: "dust", grams: 80 },
      { cause: "metal", grams: 20 },
    ]);
  });

  it("lets damp stock come out heavier, and lighter when it has dried", () => {
    const number = room.fill(1000);
    const washed = save(room, {
      kind: "washing",
      inputs: [all(number)],
      outputs: [out(room, 1080)],
    });
    expect(washed).toMatchObject({ lossGrams: 0, differenceGrams: -80 });
    const damp = washed.outputs[0]!.number;
    expect(getLotRecord(room.db.reader, damp)).toMatchObject({ form: "whole", wash: "washed" });
    const dried = save(room, {
      kind: "drying",
      inputs: [all(damp)],
      outputs: [out(room, 985)],
      cause: "moisture",
    });
    expect(dried).toMatchObject({ lossGrams: 95 });
    expect(getLotRecord(room.db.reader, dried.outputs[0]!.number)?.wash).toBe("dry");
    const sum = rows(
      room,
      "select sum(held) as held, sum(collected) as collected, sum(loss) as loss, sum(difference) as difference from totals_month",
    )[0];
    expect(sum).toEqual({ held: 985, collected: 1000, loss: 95, difference: -80 });
  });

  it("posts more or less than the book held, within tolerance, in the same entry", () => {
    const number = room.fill(1000);
    const receipt = save(room, {
      inputs: [{ number, amount: { how: "taken", ...room.weighed(1002) } }],
      outputs: [out(room, 1001)],
    });
    // 1002 in, 1001 out: 1 g difference; the book gave 1000, so 2 g came in.
    expect(receipt).toMatchObject({ inputGrams: 1002, differenceGrams: 1 });
    expect(lastLines(room)).toEqual([
      { account: "lot", cause: null, grams: -1000 },
      { account: "difference", cause: null, grams: -1 },
      { account: "lot", cause: null, grams: 1001 },
    ]);
  });

  it("goes through with one count on the spot when the book holds less", () => {
    const number = room.fill(500);
    const more = {
      inputs: [
        {
          number,
          amount: { how: "taken", ...room.weighed(900) },
          count: { found: "empty" },
        },
      ],
      outputs: [out(room, 900)],
    };
    expect(save(room, more)).toMatchObject({ inputGrams: 900 });
    expect(room.held(number)).toBe(0);
    expect(rows(room, "select kind, counted_grams from counts")).toEqual([
      { kind: "on-the-spot", counted_grams: 900 },
    ]);
  });

  it("of a closed lot works, and fills no lot that it takes from", () => {
    const number = room.fill(1000, { form: "flake" });
    const first = save(room, { inputs: [all(number)], outputs: [out(room, 1000)] });
    expect(first.outputs[0]).toMatchObject({ number: number + 1, opened: true });
    const again = room.fill(50, { form: "flake" });
    expect(again).toBe(number + 1);
    const second = save(room, {
      inputs: [
        { number, amount: { how: "taken", ...room.weighed(20) }, count: { found: "empty" } },
      ],
      outputs: [out(room, 20)],
    });
    expect(second.closed).toEqual([]);
    expect(second.outputs[0]?.number).toBe(number + 1);
  });
});

describe("bad input has its own sentence", () => {
  it("more out than in, beyond tolerance and not damp", () => {
    const number = room.fill(1000);
    const more = { inputs: [all(number)], outputs: [out(room, 1100)] };
    let said = "";
    try {
      save(room, more);
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      said = sentence(error.code, error.detail);
      expect(error.path).toEqual(["confirmed"]);
    }
    expect(said).toBe(
      "1.000 kg went in and 1.100 kg came out, 0.100 kg more. Nothing was saved; weigh both again, and if it stays so, confirm it.",
    );
    expect(rows(room, "select id from steps")).toEqual([]);
    expect(getLotRecord(room.db.reader, number)?.closedAt).toBeNull();
    expect(save(room, { ...more, confirmed: true })).toMatchObject({ differenceGrams: -100 });
  });

  it("lots of two polymers, of two forms, twice the same, or none", () => {
    const a = room.fill(1000);
    const pp = room.fill(1000, { polymer: "PP" });
    const flake = room.fill(1000, { form: "flake" });
    const outputs = [out(room, 2000)];
    expect(refusal(room, { inputs: [all(a), all(pp)], outputs })).toBe("step-polymers-differ");
    expect(refusal(room, { kind: "washing", inputs: [all(a), all(flake)], outputs })).toBe(
      "step-forms-differ",
    );
    expect(refusal(room, { inputs: [all(a), all(a)], outputs })).toBe("lot-twice");
    expect(refusal(room, { inputs: [all(77)], outputs })).toBe("unknown-lot");
  });

  it("several kinds or colours without a word on what came out, and a colour that is none", () => {
    const a = room.fill(1000);
    const bottles = room.fill(1000, { kind: "bottles" });
    const white = room.fill(1000, { colour: "white" });
    const outputs = [out(room, 2000)];
    expect(refusal(room, { inputs: [all(a), all(bottles)], outputs })).toBe("step-output-kind");
    expect(refusal(room, { inputs: [all(a), all(white)], outputs })).toBe("step-output-colour");
    expect(
      refusal(room, { inputs: [all(a)], outputs: [out(room, 1000, { colourCode: "gold" })] }),
    ).toBe("unknown-colour");
  });

  it("weighed back to more, an empty lot, a stated weight, and readings that cannot be", () => {
    const number = room.fill(1000);
    const outputs = [out(room, 500)];
    const back = (before: number, after: number) => ({
      inputs: [
        {
          number,
          amount: {
            how: "weighed-back",
            scaleId: room.scaleId,
            before: onFineScale(before),
            after: onFineScale(after),
          },
        },
      ],
      outputs,
    });
    expect(refusal(room, back(500, 500))).toBe("weighed-back-more");
    expect(refusal(room, back(500, 900))).toBe("weighed-back-more");
    expect(
      refusal(room, { inputs: [{ number, amount: { how: "stated", grams: 5 } }], outputs }),
    ).toBe("stated-in-correction");
    expect(refusal(room, { inputs: [all(number)], outputs: [out(room, 7000)] })).toBe("above-max");
    save(room, { inputs: [all(number)], outputs: [out(room, 1000)] });
    expect(refusal(room, { inputs: [all(number)], outputs })).toBe("lot-empty");
  });

  it("nothing in, nothing out, and minutes that are none, by the contract", () => {
    const number = room.fill(10);
    const bad = (more: object) =>
      saveStepSchema.safeParse({
        requestId: newId(NOON),
        kind: "shredding",
        occurredAt: NOON,
        inputs: [all(number)],
        outputs: [out(room, 10)],
        ...more,
      }).success;
    expect(bad({})).toBe(true);
    expect(bad({ inputs: [] })).toBe(false);
    expect(bad({ outputs: [] })).toBe(false);
    expect(bad({ minutes: 0 })).toBe(false);
    expect(bad({ losses: [{ cause: "dust", grams: 0 }] })).toBe(false);
  });
});

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

describe("steps as they are read", () => {
  it("are listed newest first, in pages, by kind, and one is shown with its readings", () => {
    for (let at = 0; at < 60; at += 1) {
      const input = step(room, {
        requestId: newId(NOON + at),
        kind: at % 2 === 0 ? "washing" : "shredding",
        inputs: [all(room.fill(100))],
        outputs: [out(room, 100)],
      });
      saveStep(room.ctx("lead", NOON, input), input);
    }
    const first = listSteps(room.ctx("volunteer"), { kind: undefined, before: undefined });
    expect(first.steps).toHaveLength(50);
    const second = listSteps(room.ctx("volunteer"), { kind: undefined, before: first.next! });
    expect(second).toMatchObject({ next: null });
    expect(new Set([...first.steps, ...second.steps].map(({ stepId }) => stepId)).size).toBe(60);
    expect(listSteps(room.ctx("lead"), { kind: "washing", before: undefined }).steps).toHaveLength(
      30,
    );
    const view = getStep(room.ctx("volunteer"), first.steps[0]!.stepId);
    expect(view).toMatchObject({
      polymer: "PE-HD",
      inputs: [{ colourName: "Blue", scaleId: null, grams: 100 }],
      outputs: [{ scaleName: "Fine scale", grossMilligrams: 100_000, tareMilligrams: 0 }],
    });
    expect(getStep(room.ctx("lead"), newId<"step">())).toBeNull();
    const plan = rows(room, `explain query plan ${STEPS_SQL}`, { before: "g", kind: null })
      .map((one) => (one as { detail: string }).detail)
      .join("\n");
    expect(plan).toMatch(/s USING INDEX sqlite_autoindex_steps_1 \(id<\?\)/);
  });

  it("give the scheme's own loss, by polymer, from the last ones that still stand", () => {
    const shred = (grams: number, polymer: "PE-HD" | "PP", at: number) =>
      save(
        room,
        {
          inputs: [all(room.fill(1000, { polymer }))],
          outputs: [out(room, grams)],
          cause: "dust",
        },
        instant(NOON + at),
      );
    shred(980, "PE-HD", 1);
    shred(960, "PP", 2);
    const wrong = shred(500, "PE-HD", 3);
    undoStep(room.ctx("lead", instant(NOON + 4)), { requestId: newId(), id: wrong.stepId });
    const losses = listOwnLosses(room.ctx("volunteer"));
    expect(losses.map(({ kind, count }) => [kind, count])).toEqual([
      ["washing", 0],
      ["drying", 0],
      ["shredding", 2],
    ]);
    expect(losses[2]?.mean).toBeCloseTo(0.03, 12);
    expect(losses[2]?.spread).toBeCloseTo(Math.sqrt(0.0002), 12);
    expect(ownLoss(room.db.reader, "shredding", "PP")).toMatchObject({ count: 1, mean: 0.04 });
    for (let at = 0; at < 25; at += 1) shred(990, "PE-HD", 10 + at);
    expect(ownLoss(room.db.reader, "shredding").count).toBe(20);
    expect(ownLoss(room.db.reader, "shredding").mean).toBeCloseTo(0.01, 12);
    const plan = rows(room, `explain query plan ${OWN_LOSS_SQL}`, {
      kind: "shredding",
      polymer: "PP",
    })
      .map((one) => (one as { detail: string }).detail)
      .join("\n");
    expect(plan).toContain("steps_kind_recorded (kind=?)");
  });
});
