import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { saveStep } from "@/lib/stock/commands/save-step";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, type TestScheme } from "../../support/scheme";
import { onFineScale, stockRoom, type StockRoom } from "../../support/stock-room";
import { all, example, out, rows, save, step } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const refusal = (of: StockRoom, more: object) => refusalOf(() => save(of, more));
const stepLines = (of: TestScheme) =>
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
      expect(stepLines(scheme)).toEqual([
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
    expect(stepLines(room)).toEqual([
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
