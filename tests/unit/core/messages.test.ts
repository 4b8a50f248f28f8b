import { describe, expect, it } from "vitest";
import { AppError, ERROR_STATUS, type ErrorCode, type ErrorDetail } from "@/lib/core/errors";
import { massSentence } from "@/lib/core/capture-messages";
import { sentence } from "@/lib/core/messages";

const codes = Object.keys(ERROR_STATUS) as ErrorCode[];
/** Answers every value a sentence may ask for with the value's own name. */
const named = new Proxy<ErrorDetail>({}, { get: (_target, name) => `<${String(name)}>` });

describe("sentences", () => {
  it.each(codes)("%s: one or more whole sentences in plain words", (code) => {
    const words = sentence(code, named);
    expect(words).toMatch(/^["<A-Z]/);
    expect(words).toMatch(/[.?]$/);
    expect(words.length).toBeGreaterThan(20);
    expect(words).not.toMatch(/undefined|null|NaN|\[object|!| {2}/);
    // No code's own name, status or technical word reaches a person.
    if (code.includes("-")) expect(words).not.toContain(code);
    expect(words).not.toMatch(/\b(40\d|42\d|500|SQL|database error|exception|HTTP|JSON|UUID)\b/);
  });

  it("say that nothing was saved, or what was kept, wherever somebody tried to write", () => {
    const silent = codes.filter(
      (code) =>
        [409, 422].includes(ERROR_STATUS[code]) &&
        !/[Nn]othing was|kept|saved|undone already|already/.test(sentence(code, named)),
    );
    expect(silent).toEqual([]);
  });

  it("show the values they were given", () => {
    const words = sentence("bag-already-weighed", {
      kg: "2.160",
      when: "6 May 2026, 14:05",
      who: "Ada",
    });
    for (const value of ["2.160", "6 May 2026, 14:05", "Ada"]) expect(words).toContain(value);
  });

  it("are each their own", () => {
    expect(new Set(codes.map((code) => sentence(code, named))).size).toBe(codes.length);
  });

  it("tell each way in which a weight cannot be read apart", () => {
    const problems = [
      "empty",
      "not-a-number",
      "could-be-thousands",
      "negative",
      "too-precise",
      "too-large",
    ] as const;
    expect(new Set(problems.map((problem) => massSentence(problem, "1,234"))).size).toBe(
      problems.length,
    );
    expect(massSentence("could-be-thousands", "1,234")).toContain('"1,234"');
  });
});

describe("a refusal", () => {
  it("carries its code, its values and its place, and has a status of a refusal", () => {
    const error = new AppError("above-max", { maxKg: "60" }, ["readings", 0, "gross"]);
    expect(error).toMatchObject({
      name: "AppError",
      code: "above-max",
      detail: { maxKg: "60" },
      path: ["readings", 0, "gross"],
    });
    for (const code of codes) expect(ERROR_STATUS[code]).toBeGreaterThanOrEqual(400);
  });
});
