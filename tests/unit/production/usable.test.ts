/** Which material a method takes as it is, and which steps lead there: every form, wash state and method. */
import { describe, expect, it } from "vitest";
import { FORMS, WASH_STATES, type Form, type WashState } from "@/lib/core/plastics";
import { isUsable, stepsBefore } from "@/lib/production/rules/usable";
import { HEATABLE, METHODS, type Method } from "@/lib/production/terms";

/** "-" for as it is, "none" where no step leads there. */
const TABLE: Record<Method, Record<WashState, Partial<Record<Form, string>>>> = {
  moulding: {
    "as-received": {
      whole: "washing drying shredding",
      flake: "washing drying",
      sheet: "washing drying shredding",
      offcut: "washing drying shredding",
    },
    washed: {
      whole: "drying shredding",
      flake: "drying",
      sheet: "drying shredding",
      offcut: "drying shredding",
    },
    dry: { whole: "shredding", flake: "-", sheet: "shredding", offcut: "shredding" },
  },
  pressing: {
    "as-received": { whole: "-", flake: "-", sheet: "-", offcut: "-" },
    washed: { whole: "-", flake: "-", sheet: "-", offcut: "-" },
    dry: { whole: "-", flake: "-", sheet: "-", offcut: "-" },
  },
  cutting: {
    "as-received": { whole: "none", flake: "none", sheet: "-", offcut: "none" },
    washed: { whole: "none", flake: "none", sheet: "-", offcut: "none" },
    dry: { whole: "none", flake: "none", sheet: "-", offcut: "none" },
  },
};

const cases = METHODS.flatMap((method) =>
  WASH_STATES.flatMap((wash) =>
    FORMS.map((form) => [method, form, wash, TABLE[method][wash][form]] as const),
  ),
);

describe("what a method takes", () => {
  it.each(cases)("%s of %s, %s: %s", (method, form, wash, expected) => {
    expect(expected).toBeDefined();
    const steps = stepsBefore(method, { form, wash });
    expect(steps === null ? "none" : steps.join(" ") || "-").toBe(expected);
    expect(isUsable(method, { form, wash })).toBe(expected === "-");
  });

  it("is never PVC, mixed or not sure", () => {
    expect(HEATABLE).toHaveLength(new Set(HEATABLE).size);
    for (const never of ["PVC", "O", "mixed", "not-sure"]) {
      expect(HEATABLE as readonly string[]).not.toContain(never);
    }
  });
});
