import { describe, expect, it } from "vitest";
import {
  bodyOf,
  formErrors,
  gramsOf,
  newLoad,
  problemsOf,
  type RemovalDraft,
} from "@/components/removals/removal-draft";
import { removalDataSchema } from "@/lib/removals/contract/removals";

const ID = "0190b3f4-7c1a-7000-8000-000000000000";
const draft = (change: Partial<RemovalDraft> = {}): RemovalDraft => ({
  how: "stated",
  scaleId: "",
  loads: [{ ...newLoad(null), statedKg: "12,5" }],
  destinationId: ID,
  day: "2026-05-06",
  noteNumber: "TN 1",
  ...change,
});

describe("the form of a removal", () => {
  it("comes to what the contract takes, for each way of knowing the weight", () => {
    expect(removalDataSchema.parse(bodyOf(draft(), []))).toMatchObject({
      taking: { how: "stated", loads: [{ lotNumber: null, whole: false, grams: 12_500 }] },
      confirmedAbove: false,
    });
    expect(removalDataSchema.parse(bodyOf(draft({ how: "book" }), [])).taking).toEqual({
      how: "book",
      loads: [{ lotNumber: null }],
    });
    const weighed = draft({ how: "weighed", scaleId: ID });
    const [reading] = weighed.loads[0]?.readings ?? [];
    if (!reading) throw new Error("a reading");
    reading.gross = "2.340";
    expect(removalDataSchema.parse(bodyOf(weighed, [])).taking).toMatchObject({
      scaleId: ID,
      loads: [{ readings: [{ grossMilligrams: 2_340_000 }] }],
    });
  });

  it("names what is missing, the first of the page first", () => {
    const empty = draft({ how: "weighed", loads: [newLoad(null)], destinationId: "", day: "" });
    expect(bodyOf(empty, [])).toBeNull();
    expect(Object.keys(problemsOf(empty, []))).toEqual([
      "scaleId",
      "loads.0.readings.0.gross",
      "destinationId",
      "day",
    ]);
    expect(problemsOf(draft({ loads: [] }), [])).toEqual({ loads: "Add at least one lot." });
    expect(problemsOf(draft({ loads: [newLoad(null)] }), [])).toHaveProperty(["loads.0.grams"]);
  });

  it("reads a weight so far, or what the book says", () => {
    const load = { ...newLoad(null), statedKg: "0.75" };
    expect(gramsOf({ how: "stated" }, load, 900, [])).toBe(750);
    expect(gramsOf({ how: "book" }, load, 900, [])).toBe(900);
    expect(gramsOf({ how: "weighed" }, load, 900, [])).toBeNull();
  });

  it("puts a refusal beside its field, in a correction too", () => {
    expect(
      formErrors({
        "taking.loads.0.readings.1.grossMilligrams": "a",
        "replacement.taking.loads.0.readings.0.containerId": "b",
        "replacement.day": "c",
      }),
    ).toEqual({
      "loads.0.readings.1.gross": "a",
      "loads.0.readings.0.container.text": "b",
      day: "c",
    });
  });
});
