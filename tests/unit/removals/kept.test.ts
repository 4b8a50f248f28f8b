import { describe, expect, it } from "vitest";
import { isChanged, takenUp } from "@/components/removals/kept-removal";
import { newLoad, type RemovalDraft } from "@/components/removals/removal-draft";
import { day } from "@/lib/core/time";

const LOT = { number: 118, name: "Blue HDPE", detail: "flake, washed", heldGrams: 4000 };
const start = (loads: RemovalDraft["loads"] = [newLoad(null)]): RemovalDraft => ({
  how: "weighed",
  scaleId: "bench",
  loads,
  destinationId: "",
  day: "2026-12-02",
  noteNumber: "",
});
const lists = {
  today: day("2026-12-02"),
  destinations: [{ id: "works" }],
  scales: [{ id: "bench" }, { id: "floor" }],
};
const kept = (change: Partial<RemovalDraft> = {}, today = "2026-12-01") => ({
  requestId: "r",
  today,
  draft: {
    ...start(),
    scaleId: "floor",
    destinationId: "works",
    day: "2026-12-01",
    noteNumber: "TN 7",
    ...change,
  },
});
/** As it comes back from a device. */
const stored = (value: unknown) => JSON.parse(JSON.stringify(value)) as object;

describe("a removal that was typed and not saved", () => {
  it("is taken up with its request id, so that a lost answer makes no second one", () => {
    expect(takenUp(stored(kept()), start(), lists)).toMatchObject({
      requestId: "r",
      draft: { scaleId: "floor", destinationId: "works", noteNumber: "TN 7" },
    });
  });

  it("has today's day where nobody chose another", () => {
    expect(takenUp(stored(kept()), start(), lists)?.draft.day).toBe("2026-12-02");
    const chosen = stored(kept({ day: "2026-11-28" }));
    expect(takenUp(chosen, start(), lists)?.draft.day).toBe("2026-11-28");
  });

  it("has to choose again what is no longer in the lists", () => {
    const gone = stored(kept({ scaleId: "sold", destinationId: "closed" }));
    expect(takenUp(gone, start(), lists)?.draft).toMatchObject({
      scaleId: "bench",
      destinationId: "",
    });
  });

  it("is left where it is when the page was opened for another lot", () => {
    const opened = start([newLoad(LOT)]);
    expect(takenUp(stored(kept()), opened, lists)).toBeNull();
    const same = stored(kept({ loads: [{ ...newLoad(LOT), statedKg: "1" }] }));
    expect(takenUp(same, opened, lists)?.draft.loads).toMatchObject([{ statedKg: "1" }]);
  });

  it("is nothing where another version wrote something else", () => {
    for (const other of [null, {}, { draft: {} }, { requestId: "r", today: "", draft: null }]) {
      expect(takenUp(other, start(), lists)).toBeNull();
    }
  });

  it("is kept once something was changed", () => {
    expect(isChanged(start(), start())).toBe(false);
    expect(isChanged({ ...start(), noteNumber: "TN 7" }, start())).toBe(true);
  });
});
