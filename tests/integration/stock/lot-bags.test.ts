/** The bags that a lot names: also those of one kind, which went in at the scale and were never sorted. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { getLot } from "@/lib/stock/queries/lots";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import { undoWeighInInputSchema } from "@/lib/weighing/contract/weigh-ins";
import { NOON } from "../../support/scheme";
import { weighingDesk } from "../../support/weighing-desk";

let desk: ReturnType<typeof weighingDesk>;
beforeEach(() => {
  desk = weighingDesk();
});
afterEach(() => desk.close());

const LIDS = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true };

describe("bags of a lot", () => {
  it("are named when they went in at the scale, and no longer when that was taken back", () => {
    const [first = "", second = ""] = desk.tags(2);
    const kept = desk.weigh(first, {}, LIDS);
    const back = desk.weigh(second, {}, LIDS);
    const named = () => getLot(desk.ctx("volunteer", NOON), 1)?.bags;
    const row = (code: string) => ({
      code,
      pointName: "Harbour Road Library",
      sortedAt: NOON,
      grams: 2160,
    });
    expect(kept).toMatchObject({ kind: "posted", lot: { number: 1 } });
    expect(named()).toEqual([row(second), row(first)]);
    if (back.kind !== "posted") throw new Error(back.kind);
    const undo = undoWeighInInputSchema.parse({ requestId: newId(NOON), id: back.weighInId });
    undoWeighIn(desk.ctx("volunteer", NOON, undo), undo);
    expect(named()).toEqual([row(first)]);
  });
});
