import { describe, expect, it } from "vitest";
import {
  bodyOf,
  EMPTY_DRAFT,
  netOf,
  newPile,
  newReject,
  readingsOf,
  type PileDraft,
} from "@/components/sorting/draft";
import { sumWords } from "@/components/sorting/sum-words";

const crate = { id: "c", kind: "container" as const, name: "Crate", tareMilligrams: 150_000 };
const reading = (gross: string) => ({ ...newPile(undefined).reading, gross });
const pile: PileDraft = {
  ...newPile(undefined),
  polymer: "PE-HD",
  colourCode: "blue",
  kind: "lids",
  reading: reading("1,296"),
};

describe("what lies on the table", () => {
  it("comes to nothing while a pile is incomplete, and keeps what is typed", () => {
    expect(bodyOf(EMPTY_DRAFT, [])).toEqual({ piles: [], rejects: [] });
    // "1,296" could be a thousand.
    expect(bodyOf({ piles: [pile], rejects: [] }, [])).toBeNull();
    expect(netOf(pile.reading, [])).toBeNull();
    const complete = { ...pile, reading: reading("1.296") };
    expect(bodyOf({ piles: [complete], rejects: [] }, [])?.piles).toEqual([
      {
        lot: null,
        polymer: "PE-HD",
        colourCode: "blue",
        kind: "lids",
        form: "whole",
        wash: "as-received",
        reading: {
          grossMilligrams: 1_296_000,
          containerId: null,
          containerTareMilligrams: 0,
          sackId: null,
          sackTareMilligrams: 0,
        },
      },
    ]);
    expect(bodyOf({ piles: [{ ...complete, kind: "" }], rejects: [] }, [])).toBeNull();
    expect(bodyOf({ piles: [complete], rejects: [newReject(undefined)] }, [])).toBeNull();
  });

  it("sends the lot that was chosen", () => {
    const chosen = { ...pile, lot: "new" as const, reading: reading("1.296") };
    expect(bodyOf({ piles: [chosen], rejects: [] }, [])?.piles[0]?.lot).toBe("new");
    expect(newPile(chosen).lot).toBeNull();
  });

  it("takes tares from the list", () => {
    const inCrate = { ...reading("1.150"), container: { choice: "c", text: "" } };
    expect(netOf(inCrate, [crate])).toBe(1000);
    expect(
      readingsOf({ piles: [{ ...pile, reading: inCrate }], rejects: [] }, [crate])[0],
    ).toMatchObject({
      containerId: "c",
      containerTareMilligrams: 150_000,
    });
  });

  it("begins the next pile with the last one's polymer, kind and tare, but no colour and no weight", () => {
    const next = newPile({
      ...pile,
      reading: { ...pile.reading, container: { choice: "c", text: "" } },
    });
    expect(next).toMatchObject({ polymer: "PE-HD", kind: "lids", colourCode: "" });
    expect(next.reading).toMatchObject({ gross: "", container: { choice: "c" } });
    expect(next.id).not.toBe(pile.id);
  });
});

describe("the words under the bar", () => {
  const of = (fractions: number, bags = 1) => ({ fractions, bags });
  it("say how piles and net compare", () => {
    expect(sumWords({ kind: "within", differenceGrams: 8 }, of(3), 12_000).words).toBe(
      "8 g left over, within what the scale can tell.",
    );
    expect(sumWords({ kind: "within", differenceGrams: 0 }, of(3), 12_000).words).toBe(
      "All of it is on the table.",
    );
    expect(sumWords({ kind: "needs-cause", differenceGrams: 1200 }, of(1), 12_000).words).toBe(
      "1.200 kg still to weigh.",
    );
    expect(sumWords({ kind: "needs-check", differenceGrams: -90 }, of(1), 12_000)).toEqual({
      words: "0.090 kg more than the bag held; the scale can explain 0.012 kg.",
      tone: "warn",
    });
    expect(sumWords({ kind: "needs-check", differenceGrams: -90 }, of(1, 5), 12_000).words).toBe(
      "0.090 kg more than the bags held; the scale can explain 0.012 kg.",
    );
    expect(sumWords({ kind: "needs-cause", differenceGrams: 2160 }, of(0), 12_000).words).toBe(
      "Weigh the first pile.",
    );
    expect(sumWords({ kind: "within", differenceGrams: 0 }, of(2, 0), 12_000).words).toBe(
      "Put a bag on the table first.",
    );
  });
});
