import { describe, expect, it } from "vitest";
import { EMPTY_DRAFT } from "@/components/sorting/draft";
import { draftFrom } from "@/components/sorting/from-fractions";
import { judgeDraft } from "@/components/sorting/judged";
import { readFilter, waitingAddress } from "@/components/sorting/waiting-address";
import { newId } from "@/lib/core/ids";
import type { StoredFraction } from "@/lib/sorting/queries/fractions";

const SCALE = {
  class: "III" as const,
  maxMilligrams: 30_000_000,
  eMilligrams: 5_000,
  dMilligrams: 5_000,
  statedAccuracyMilligrams: null,
};
const bag = (netGrams: number) => ({
  netGrams,
  readings: [{ loadMilligrams: netGrams * 1000, scale: SCALE }],
});

const fraction = (fields: Partial<StoredFraction> = {}): StoredFraction => ({
  pile: {
    polymer: "PP",
    colourName: "White",
    colourHex: "#ffffff",
    colourLook: "solid",
    kind: "tubs",
    form: "whole",
    wash: "as-received",
    lotNumber: 12,
    colourCode: "white",
    lotClosed: false,
  },
  rejectReason: null,
  rejectName: null,
  grossMilligrams: 1_296_000,
  tareMilligrams: 150_000,
  netGrams: 1146,
  ...fields,
});

describe("several bags on one table", () => {
  it("are judged as one net, with the readings of each in the tolerance", () => {
    const one = judgeDraft(EMPTY_DRAFT, [bag(2160)], undefined, []);
    const five = judgeDraft(
      EMPTY_DRAFT,
      [1, 2, 3, 4, 5].map(() => bag(2160)),
      undefined,
      [],
    );
    expect(one).toMatchObject({ netGrams: 2160, sumGrams: 0, verdict: { kind: "needs-cause" } });
    expect(five.netGrams).toBe(10_800);
    // u of five equal readings is sqrt(5) times that of one.
    expect(five.toleranceMilligrams / one.toleranceMilligrams).toBeCloseTo(Math.sqrt(5), 2);
  });
});

describe("a saved session back in the form", () => {
  it("reads what was read, and keeps its lot while that is open", () => {
    const draft = draftFrom(
      [fraction(), fraction({ pile: null, rejectReason: "food", rejectName: "Food or dirt" })],
      "scale",
      { lots: "open" },
    );
    expect(draft).toMatchObject({
      scaleId: "scale",
      piles: [
        {
          polymer: "PP",
          colourCode: "white",
          kind: "tubs",
          lot: 12,
          reading: { gross: "1.296", container: { choice: "typed", text: "0.150" } },
        },
      ],
      rejects: [{ reason: "food", reading: { gross: "1.296" } }],
    });
    expect(judgeDraft(draft, [bag(2292)], undefined, []).verdict.kind).toBe("within");
    const closed = fraction({ pile: { ...fraction().pile!, lotClosed: true } });
    expect(draftFrom([closed], "", { lots: "open" }).piles[0]?.lot).toBeNull();
    // In a correction it stays where it lies.
    expect(draftFrom([closed], "", { lots: "own" }).piles[0]).toMatchObject({
      lot: 12,
      ownLot: 12,
    });
  });
});

describe("the waiting list's address", () => {
  it("holds the filter, and leaves out what cannot be read", () => {
    const pointId = newId<"point">();
    const filter = readFilter(
      new URLSearchParams({ point: pointId, polymer: "PP", condition: "wet", q: " quay " }),
    );
    expect(filter).toEqual({ pointId, polymer: "PP", condition: "wet", point: "quay" });
    const address = waitingAddress(filter, "12_b");
    expect(readFilter(new URL(address, "http://x").searchParams)).toEqual(filter);
    expect(
      readFilter(new URLSearchParams({ point: "1 or 1", polymer: "gold", condition: "", q: "" })),
    ).toEqual({});
    expect(waitingAddress({})).toBe("/sorting");
  });
});
