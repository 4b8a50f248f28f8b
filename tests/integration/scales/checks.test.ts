import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type ScaleId } from "@/lib/core/ids";
import { day, instant } from "@/lib/core/time";
import {
  addCheckWeight,
  restoreCheckWeight,
  retireCheckWeight,
} from "@/lib/scales/commands/check-weights";
import { checkScale, clearScale } from "@/lib/scales/commands/checks";
import { addScale, retireScale } from "@/lib/scales/commands/scales";
import { listCheckWeights, listManagedCheckWeights } from "@/lib/scales/queries/check-weights";
import { getScaleHistory, listScalesToday } from "@/lib/scales/queries/checks";
import { basisOf } from "@/lib/scales/queries/instruments";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

/** Class III, Max 15 kg, e = d = 5 g: ± 5 g up to 2.5 kg in service. */
function addedScale(scheme: TestScheme, name = "Bench scale"): ScaleId {
  return addScale(scheme.ctx("coordinator"), {
    requestId: newId(),
    name,
    class: "III",
    maxMilligrams: 15_000_000,
    eMilligrams: 5_000,
    dMilligrams: 5_000,
  }).id;
}

function addedWeight(scheme: TestScheme, name = "Brass two kilograms", massMilligrams = 2_000_000) {
  const input = { requestId: newId(), name, massMilligrams, evidence: "Certificate 118" };
  return addCheckWeight(scheme.ctx("coordinator", NOON, input), input);
}

describe("addCheckWeight", () => {
  commandCases({
    command: addCheckWeight,
    by: "coordinator",
    notBy: "lead",
    input: () => ({
      requestId: newId(),
      name: "Brass two kilograms",
      massMilligrams: 2_000_000,
      evidence: "Weighed on the market's verified scale, 3 May 2026",
    }),
    does: (scheme, answer, { requestId }) => {
      expect(answer).toMatchObject({ id: requestId, massMilligrams: 2_000_000, retiredAt: null });
      expect(listCheckWeights(scheme.ctx("volunteer")).items).toEqual([answer]);
    },
    wrongState: (scheme) => {
      addedWeight(scheme);
      return {
        input: {
          requestId: newId(),
          name: "brass two Kilograms",
          massMilligrams: 5,
          evidence: "-",
        },
        code: "name-in-use",
      };
    },
    action: "check-weights.add",
  });
});

describe("retireCheckWeight", () => {
  commandCases({
    command: retireCheckWeight,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), checkWeightId: addedWeight(scheme).id }),
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBe(NOON);
      expect(listCheckWeights(scheme.ctx("lead")).items).toEqual([]);
      expect(listManagedCheckWeights(scheme.ctx())).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), checkWeightId: newId<"check-weight">() },
      code: "not-found",
    }),
    action: "check-weights.retire",
  });
});

describe("restoreCheckWeight", () => {
  commandCases({
    command: restoreCheckWeight,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      const { id } = addedWeight(scheme);
      const retire = { requestId: newId(), checkWeightId: id };
      retireCheckWeight(scheme.ctx("coordinator", NOON, retire), retire);
      return { requestId: newId(), checkWeightId: id };
    },
    does: (_, answer) => expect(answer.retiredAt).toBeNull(),
    wrongState: () => ({
      input: { requestId: newId(), checkWeightId: newId<"check-weight">() },
      code: "not-found",
    }),
    action: "check-weights.restore",
  });
});

const checking = (scheme: TestScheme, readingMilligrams: number) => ({
  requestId: newId(),
  scaleId: addedScale(scheme),
  checkWeightId: addedWeight(scheme).id,
  readingMilligrams,
});

describe("checkScale", () => {
  commandCases({
    command: checkScale,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => checking(scheme, 2_005_000),
    does: (scheme, answer, { requestId, scaleId }) => {
      expect(answer).toEqual({
        checkId: requestId,
        attempt: 1,
        errorMilligrams: 5_000,
        limitMilligrams: 5_000,
        passed: true,
        state: "confirmed",
      });
      expect(basisOf(scheme.db.reader, scaleId, NOON)).toBe("checked");
      expect(getScaleHistory(scheme.ctx("volunteer"), scaleId)?.checks).toMatchObject([
        { day: "2026-05-06", attempt: 1, readingMilligrams: 2_005_000, byName: "Test volunteer" },
      ]);
    },
    wrongState: (scheme) => {
      const input = checking(scheme, 2_010_000);
      for (const requestId of [newId(), newId()]) {
        checkScale(scheme.ctx("volunteer"), { ...input, requestId });
      }
      return { input, code: "check-failed-twice" };
    },
    action: "scales.check",
  });
});

describe("clearScale", () => {
  commandCases({
    command: clearScale,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      scaleId: addedScale(scheme),
      day: day("2026-05-06"),
      note: "Levelled it, and weighed a crate on both scales",
    }),
    does: (scheme, answer, { scaleId }) => {
      expect(answer).toEqual({ scaleId, day: "2026-05-06", state: "cleared" });
      expect(basisOf(scheme.db.reader, scaleId, NOON)).toBe("checked");
      expect(getScaleHistory(scheme.ctx("volunteer"), scaleId)).toMatchObject({
        state: "cleared",
        clearances: [{ day: "2026-05-06", byName: "Test lead" }],
      });
    },
    wrongState: (scheme) => {
      const scaleId = addedScale(scheme);
      const clear = { requestId: newId(), scaleId, day: day("2026-05-06"), note: "Levelled" };
      clearScale(scheme.ctx("lead", NOON, clear), clear);
      return { input: { ...clear, requestId: newId() }, code: "scale-cleared-already" };
    },
    action: "scales.clear",
  });
});

let scheme: TestScheme;
let scaleId: ScaleId;
let weightId: ReturnType<typeof addedWeight>["id"];
beforeEach(() => {
  scheme = newScheme({ timeZone: "Europe/London" });
  scaleId = addedScale(scheme);
  weightId = addedWeight(scheme).id;
});
afterEach(() => scheme.close());

const check = (readingMilligrams: number, now = NOON, scale = scaleId) =>
  checkScale(scheme.ctx("volunteer", now), {
    requestId: newId(now),
    scaleId: scale,
    checkWeightId: weightId,
    readingMilligrams,
  });
const basis = (now = NOON) => basisOf(scheme.db.reader, scaleId, now);

describe("a scale's day", () => {
  it("may be repeated once, and the last word counts", () => {
    expect(basis()).toBe("unchecked");
    expect(check(2_010_000)).toMatchObject({ attempt: 1, passed: false, state: "failed-once" });
    expect(basis()).toBe("unchecked");
    expect(check(2_000_000)).toMatchObject({ attempt: 2, passed: true, state: "confirmed" });
    expect(basis()).toBe("checked");
  });

  it("is over after a second failure, until a lead clears it", () => {
    check(2_010_000);
    expect(check(1_990_000)).toMatchObject({
      attempt: 2,
      errorMilligrams: -10_000,
      state: "failed",
    });
    expect(() => check(2_000_000)).toThrow("check-failed-twice");
    expect(basis()).toBe("unchecked");
    clearScale(scheme.ctx("lead"), {
      requestId: newId(),
      scaleId,
      day: day("2026-05-06"),
      note: "Swept under the plate",
    });
    expect(basis()).toBe("checked");
    expect(check(2_000_000)).toMatchObject({ attempt: 3, state: "cleared" });
  });

  it("begins anew with the scheme's own day", () => {
    check(2_010_000);
    check(2_010_000);
    // 22:59 and 23:00 UTC: the first is still 6 May in London, the second is the 7th.
    const late = instant(Date.UTC(2026, 4, 6, 22, 59));
    const next = instant(Date.UTC(2026, 4, 6, 23, 0));
    expect(() => check(2_000_000, late)).toThrow("check-failed-twice");
    expect(check(2_000_000, next)).toMatchObject({ attempt: 1, state: "confirmed" });
    expect(basis(next)).toBe("checked");
    expect(basis(late)).toBe("unchecked");
  });

  it("is told of every scale in use, by number", () => {
    const other = addedScale(scheme, "Floor scale");
    check(2_000_000, NOON, other);
    expect(listScalesToday(scheme.ctx("volunteer"))).toEqual({
      day: "2026-05-06",
      items: [
        { scaleId, name: "Bench scale", state: "not-checked" },
        { scaleId: other, name: "Floor scale", state: "confirmed" },
      ],
    });
    expect(refusalOf(() => listScalesToday(scheme.ctx("donor")))).toBe("forbidden");
  });
});

describe("refusals", () => {
  it("of readings that the scale cannot have shown", () => {
    expect(() => check(15_005_000)).toThrow("above-max");
    expect(() => check(2_003_000)).toThrow("not-a-step");
  });

  it("of a weight above Max, of one that left the list, of a scale that did", () => {
    const heavy = addedWeight(scheme, "Twenty", 20_000_000).id;
    const of = (checkWeightId: typeof weightId) =>
      checkScale(scheme.ctx("volunteer"), {
        requestId: newId(),
        scaleId,
        checkWeightId,
        readingMilligrams: 2_000_000,
      });
    expect(() => of(heavy)).toThrow("check-weight-too-heavy");
    expect(() => of(newId<"check-weight">())).toThrow("unknown-check-weight");
    retireCheckWeight(scheme.ctx(), { requestId: newId(), checkWeightId: weightId });
    expect(() => of(weightId)).toThrow("unknown-check-weight");
    retireScale(scheme.ctx(), { requestId: newId(), scaleId });
    expect(() => check(2_000_000)).toThrow("unknown-scale");
  });

  it("of clearing a day that has not come, or a scale that is not there", () => {
    const clear = (scale: ScaleId, on: string) =>
      clearScale(scheme.ctx("lead"), {
        requestId: newId(),
        scaleId: scale,
        day: day(on),
        note: "Levelled",
      });
    expect(() => clear(scaleId, "2026-05-07")).toThrow("future-time");
    expect(() => clear(newId<"scale">(), "2026-05-06")).toThrow("not-found");
    expect(clear(scaleId, "2026-05-01")).toMatchObject({ state: "cleared" });
  });
});
