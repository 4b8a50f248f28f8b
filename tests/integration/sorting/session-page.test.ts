/** A saved session's page: what it shows before and after an undo or a correction. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId, type SortingId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { closeSorting } from "@/lib/sorting/commands/close";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { openDraft, saveDraft } from "@/lib/sorting/commands/drafts";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { getSortingPage } from "@/lib/sorting/queries/session-page";
import { newShed, onPan, sorting, type Shed } from "../../support/shed";
import { NOON } from "../../support/scheme";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => {
  shed.close();
});

const LATER = instant(NOON + 30 * 3_600_000);
const close = (input: Parameters<typeof closeSorting>[1]) =>
  closeSorting(shed.ctx("volunteer", NOON, input), input).sortingId;
const page = (id: string, who: "volunteer" | "lead" = "volunteer", at = NOON) => {
  const found = getSortingPage(shed.ctx(who, at), id);
  if (!found) throw new Error("no such session");
  return found;
};

describe("a session's page", () => {
  it("shows its bags, its readings, its lots and the difference", () => {
    const bags = [shed.weigh(2160, { point: 0 }), shed.weigh(1000, { point: 1 })];
    const input = sorting(shed, bags, {
      piles: [{ grams: 3000, colour: "white" }],
      rejects: [{ grams: 150, reason: "food" }],
    });
    const [pile] = input.piles;
    if (!pile) throw new Error("no pile");
    pile.reading = {
      ...onPan(3150),
      containerId: shed.crateId,
      containerTareMilligrams: 150_000,
    };
    const found = page(close(input));
    expect(found).toMatchObject({
      state: "closed",
      netGrams: 3160,
      differenceGrams: 10,
      cause: null,
      scale: { id: shed.scaleId, name: "Bench scale" },
      corrects: null,
      correction: null,
      later: { count: 0 },
      undoUntil: NOON + 600_000,
    });
    expect(found.bags.map(({ pointName, netGrams }) => [pointName, netGrams]).sort()).toEqual([
      ["Quay café", 1000],
      ["Town library", 2160],
    ]);
    expect(found.bags.flatMap(({ readings }) => readings)).toHaveLength(2);
    expect(found.fractions).toMatchObject([
      {
        pile: { polymer: "PE-HD", colourCode: "white", lotNumber: 1, lotClosed: false },
        grossMilligrams: 3_150_000,
        tareMilligrams: 150_000,
        netGrams: 3000,
        rejectReason: null,
      },
      { pile: null, rejectReason: "food", rejectName: "Food or dirt", netGrams: 150 },
    ]);
  });

  it("offers undo to whoever saved it, for ten minutes, once", () => {
    const id = close(sorting(shed, shed.weigh(1000), { piles: [{ grams: 1000 }] }));
    expect(page(id, "lead").undoUntil).toBeNull();
    expect(page(id, "volunteer", instant(NOON + 600_001)).undoUntil).toBeNull();
    const input = { requestId: newId(NOON), id };
    undoSorting(shed.ctx("volunteer", NOON, input), input);
    expect(page(id)).toMatchObject({ state: "undone", undoUntil: null, later: { count: 0 } });
    // What it took is still shown, and not twice: its bag holds it again.
    expect(page(id).bags[0]?.netGrams).toBe(1000);
  });

  it("names the correction both ways, and later uses of what it had filled", () => {
    const bag = shed.weigh(1000);
    const id = close(sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    const {
      requestId: _r,
      codes: _c,
      ...table
    } = sorting(shed, bag, {
      piles: [{ grams: 1000, colour: "white" }],
    });
    const correct = (of: SortingId, replacement: typeof table | null) => {
      const input = { requestId: newId(LATER), id: of, reason: "It was white", replacement };
      return correctSorting(shed.ctx("lead", LATER, input), input);
    };
    const after = correct(id, table).receipt?.sortingId as SortingId;
    expect(page(id, "lead", LATER)).toMatchObject({
      state: "corrected",
      correction: { reason: "It was white", replacementId: after },
      undoUntil: null,
    });
    expect(page(after, "lead", LATER)).toMatchObject({
      state: "closed",
      corrects: id,
      correction: null,
      undoUntil: null,
      bags: [{ netGrams: 1000 }],
    });
    correct(after, null);
    expect(page(after, "lead", LATER).correction).toMatchObject({ replacementId: null });
  });

  it("is null for a session that there is not, and refused to donors", () => {
    expect(getSortingPage(shed.ctx("volunteer"), newId())).toBeNull();
    expect(() => getSortingPage(shed.ctx("donor"), newId())).toThrow("forbidden");
  });
});

describe("a draft that is over", () => {
  it("says whether it was saved or given up, so that a page can go on", () => {
    const bag = shed.weigh(800);
    const id = newId<"sorting">(NOON);
    saveDraft(shed.ctx("volunteer"), { id, version: 0, codes: [bag.code], content: "{}" });
    close({ ...sorting(shed, bag, { piles: [{ grams: 800 }] }), requestId: id });
    try {
      openDraft(shed.ctx("lead"), { id });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(AppError);
      expect(error).toMatchObject({ code: "draft-over", detail: { state: "saved" } });
    }
  });
});
