import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { countLot } from "@/lib/stock/commands/count-lot";
import { acceptCount, correctCount } from "@/lib/stock/commands/review-count";
import { undoCount } from "@/lib/stock/commands/undo-count";
import { listCountsToReview, listLotCounts, TO_REVIEW_SQL } from "@/lib/stock/queries/counts";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { count, rows } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

describe("a lead's review", () => {
  it("lists volunteers' counts, oldest first, and none of a lead's own", () => {
    const number = room.fill(3160);
    countLot(room.ctx("volunteer", instant(NOON + 1)), count(room, number, 3100));
    countLot(room.ctx("volunteer", instant(NOON + 2)), count(room, number, 3000));
    countLot(room.ctx("lead", instant(NOON + 3)), count(room, number, 2900));
    const list = listCountsToReview(room.ctx("lead"), {});
    expect(list.counts.map(({ countedGrams }) => countedGrams)).toEqual([3100, 3000]);
    expect(list).toMatchObject({ waiting: 2, next: null });
    expect(list.counts[0]).toMatchObject({
      material: "Blue HDPE, lids, whole, as received",
      byName: "Test volunteer",
      scaleName: "Fine scale",
      undoUntil: null,
    });
    expect(refusalOf(() => listCountsToReview(room.ctx("volunteer"), {}))).toBe("forbidden");
  });

  it("goes through pages without a gap, by its index", () => {
    const number = room.fill(3160);
    for (let at = 0; at < 120; at += 1) {
      countLot(room.ctx("volunteer", instant(NOON + (at >> 1))), count(room, number, 3000 - at));
    }
    const seen: number[] = [];
    let after: string | undefined;
    do {
      const page = listCountsToReview(room.ctx("lead"), { after });
      seen.push(...page.counts.map(({ countedGrams }) => countedGrams));
      after = page.next ?? undefined;
    } while (after);
    expect(new Set(seen).size).toBe(120);
    const plan = rows(room, `explain query plan ${TO_REVIEW_SQL}`, { at: 0, id: "" })
      .map((step) => (step as { detail: string }).detail)
      .join("\n");
    expect(plan).toContain("counts_to_review");
    expect(plan).not.toMatch(/SCAN/);
  });

  const accept = (id: Id<"count">) => ({ requestId: newId(NOON), id });
  const counted = (of: StockRoom) =>
    countLot(of.ctx("volunteer"), count(of, of.fill(3160), 3120)).countId;

  describe("accepting", () => {
    commandCases({
      command: acceptCount,
      by: "lead",
      notBy: "volunteer",
      input: (scheme) => accept(counted(stockRoom(scheme))),
      does: (scheme) => {
        expect(rows(scheme, "select reviewed_by, reviewed_at from counts")).toEqual([
          { reviewed_by: scheme.people.lead, reviewed_at: NOON },
        ]);
      },
      wrongState: (scheme) => {
        const id = counted(stockRoom(scheme));
        acceptCount(scheme.ctx("lead"), accept(id));
        return { input: accept(id), code: "not-for-review" };
      },
      action: "stock.accept-count",
    });
  });

  describe("correcting", () => {
    const correct = (of: StockRoom, id: Id<"count">, grams: number | "empty" | null) => ({
      requestId: newId(NOON),
      id,
      reason: "A crate stood on the scale",
      replacement:
        grams === null
          ? null
          : grams === "empty"
            ? { found: "empty" as const }
            : { found: "weighed" as const, ...of.weighed(grams) },
    });
    commandCases({
      command: correctCount,
      by: "lead",
      notBy: "volunteer",
      input: (scheme) => {
        const of = stockRoom(scheme);
        return correct(of, counted(of), 3150);
      },
      does: (scheme, answer, input) => {
        expect(answer).toMatchObject({ heldGrams: 3150, replacementId: input.requestId });
        expect(
          rows(scheme, "select state, counted_grams, corrects from counts order by corrects"),
        ).toEqual([
          { state: "corrected", counted_grams: 3120, corrects: null },
          { state: "posted", counted_grams: 3150, corrects: input.id },
        ]);
        expect(rows(scheme, "select subject_kind, reason from corrections")).toEqual([
          { subject_kind: "count", reason: "A crate stood on the scale" },
        ]);
      },
      wrongState: (scheme) => {
        const of = stockRoom(scheme);
        const id = counted(of);
        correctCount(of.ctx("lead"), correct(of, id, 3150));
        return { input: correct(of, id, 3140), code: "corrected-already" };
      },
      action: "stock.correct-count",
    });

    it("goes through after everything was taken, names the later uses, and settles what is missing", () => {
      const number = room.fill(100);
      const first = countLot(room.ctx("volunteer"), count(room, number, 900));
      const second = countLot(room.ctx("volunteer"), count(room, number, 50));
      const late = instant(NOON + 86_400_000);
      const input = correct(room, first.countId, null);
      const answer = correctCount(room.ctx("lead", late, input), input);
      expect(answer.later).toMatchObject({
        count: 1,
        uses: [{ kind: "count", subject: `count:${second.countId}`, grams: 850 }],
      });
      // 50 − 800 cannot be: the lot is short of 750, which is settled.
      expect(answer.heldGrams).toBe(0);
      const kinds = rows(room, "select kind from entries order by id desc limit 2");
      expect(kinds).toEqual([{ kind: "settling" }, { kind: "reversal" }]);
    });

    it("of a count that had agreed posts the difference alone", () => {
      const number = room.fill(3120);
      const { countId } = countLot(room.ctx("volunteer"), count(room, number, 3120));
      const input = correct(room, countId, 3100);
      expect(correctCount(room.ctx("lead", NOON, input), input).heldGrams).toBe(3100);
      expect(rows(room, "select state, undone_act_id from counts where id = ?", countId)).toEqual([
        { state: "corrected", undone_act_id: null },
      ]);
    });

    it("cannot be undone, only corrected once more", () => {
      const id = counted(room);
      const input = correct(room, id, 3150);
      const later = instant(NOON + 1);
      const { replacementId } = correctCount(room.ctx("lead", later, input), input);
      expect(
        refusalOf(() => undoCount(room.ctx("lead"), { requestId: newId(), id: replacementId! })),
      ).toBe("undo-of-correction");
      expect(listLotCounts(room.ctx("volunteer"), 1)).toMatchObject([
        { countedGrams: 3150, state: "posted", corrects: id },
        { countedGrams: 3120, state: "corrected", reason: "A crate stood on the scale" },
      ]);
    });
  });
});
