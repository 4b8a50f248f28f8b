import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { addScale, changeScale, restoreScale, retireScale } from "@/lib/scales/commands/scales";
import type { ScaleData } from "@/lib/scales/contract/scales";
import { getScale, listManagedScales, listScales } from "@/lib/scales/queries/scales";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const KG = 1_000_000;
const G = 1_000;

const BENCH: ScaleData = {
  name: "Bench scale",
  class: "III",
  maxMilligrams: 30 * KG,
  eMilligrams: 10 * G,
  dMilligrams: 10 * G,
};
const HANGING: ScaleData = {
  name: "Hanging scale",
  class: "none",
  maxMilligrams: 50 * KG,
  dMilligrams: 50 * G,
  statedAccuracyMilligrams: 100 * G,
};

function added(scheme: TestScheme, data: ScaleData) {
  const input = { requestId: newId(), ...data };
  return addScale(scheme.ctx("coordinator", NOON, input), input);
}

describe("addScale", () => {
  commandCases({
    command: addScale,
    by: "coordinator",
    notBy: "lead",
    input: () => ({ requestId: newId(), ...BENCH }),
    does: (scheme, answer, input) => {
      expect(answer).toEqual({
        ...BENCH,
        id: input.requestId,
        number: 1,
        statedAccuracyMilligrams: null,
        retiredAt: null,
      });
      expect(listScales(scheme.ctx("volunteer")).items).toEqual([answer]);
    },
    wrongState: (scheme) => {
      added(scheme, BENCH);
      return {
        input: { requestId: newId(), ...HANGING, name: "BENCH scale" },
        code: "name-in-use",
      };
    },
    action: "scales.add",
  });
});

describe("changeScale", () => {
  commandCases({
    command: changeScale,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), scaleId: added(scheme, BENCH).id, ...HANGING }),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ ...HANGING, number: 1, eMilligrams: null });
      expect(getScale(scheme.db.reader, answer.id)).toEqual(answer);
    },
    wrongState: (scheme) => ({
      input: {
        requestId: newId(),
        scaleId: added(scheme, BENCH).id,
        ...BENCH,
        maxMilligrams: 3 * KG,
      },
      code: "scale-intervals",
    }),
    action: "scales.change",
  });
});

describe("retireScale", () => {
  commandCases({
    command: retireScale,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => ({ requestId: newId(), scaleId: added(scheme, BENCH).id }),
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBe(NOON);
      expect(listScales(scheme.ctx("lead")).items).toEqual([]);
      expect(listManagedScales(scheme.ctx())).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), scaleId: newId<"scale">() },
      code: "not-found",
    }),
    action: "scales.retire",
  });
});

describe("restoreScale", () => {
  commandCases({
    command: restoreScale,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      const { id } = added(scheme, HANGING);
      const retire = { requestId: newId(), scaleId: id };
      retireScale(scheme.ctx("coordinator", NOON, retire), retire);
      return { requestId: newId(), scaleId: id };
    },
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBeNull();
      expect(listScales(scheme.ctx("volunteer")).items).toHaveLength(1);
    },
    wrongState: () => ({
      input: { requestId: newId(), scaleId: newId<"scale">() },
      code: "not-found",
    }),
    action: "scales.restore",
  });
});

describe("scales", () => {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
  });
  afterEach(() => scheme.close());

  it("numbers scales in the order in which they come, also after one is retired", () => {
    const { id } = added(scheme, BENCH);
    const retire = { requestId: newId(), scaleId: id };
    retireScale(scheme.ctx("coordinator", NOON, retire), retire);
    expect(added(scheme, HANGING).number).toBe(2);
    expect(listManagedScales(scheme.ctx()).map((scale) => scale.number)).toEqual([2, 1]);
  });

  it.each([
    ["scale-step", { ...HANGING, dMilligrams: 30 * G }],
    ["scale-max", { ...HANGING, maxMilligrams: 50 * KG + 1 }],
    ["scale-interval", { ...BENCH, eMilligrams: 5 * G }],
    ["scale-intervals", { ...BENCH, maxMilligrams: 2 * KG }],
  ] as const)("refuses a plate that cannot be: %s", (code, data) => {
    expect(refusalOf(() => added(scheme, data))).toBe(code);
    expect(listManagedScales(scheme.ctx())).toEqual([]);
  });

  it("shows scales to the shed only", () => {
    expect(refusalOf(() => listScales(scheme.ctx("donor")))).toBe("forbidden");
    expect(refusalOf(() => listManagedScales(scheme.ctx("lead")))).toBe("forbidden");
  });
});
