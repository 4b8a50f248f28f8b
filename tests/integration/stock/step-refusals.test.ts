import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { sentence } from "@/lib/core/messages";
import { saveStepSchema } from "@/lib/stock/contract/steps";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { onFineScale, stockRoom, type StockRoom } from "../../support/stock-room";
import { all, out, rows, save } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const refusal = (of: StockRoom, more: object) => refusalOf(() => save(of, more));

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
