import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { saveStep } from "@/lib/stock/commands/save-step";
import { undoStep } from "@/lib/stock/commands/undo-step";
import { listOwnLosses, ownLoss, OWN_LOSS_SQL } from "@/lib/stock/queries/own-loss";
import { getStep, listSteps, STEPS_SQL } from "@/lib/stock/queries/steps";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { all, out, rows, save, step } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

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
