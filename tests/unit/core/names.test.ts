import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { sameName, tidyName } from "@/lib/core/names";

describe("names", () => {
  it("are stored tidy, and tidying twice changes nothing", () => {
    expect(tidyName("  Harbour \t road\n")).toBe("Harbour road");
    fc.assert(
      fc.property(fc.string(), (typed) => {
        expect(tidyName(tidyName(typed))).toBe(tidyName(typed));
        expect(tidyName(typed)).not.toMatch(/^\s|\s$|\s{2}/);
      }),
    );
  });

  it("are the same when they read the same", () => {
    expect(sameName("Harbour  road", " harbour Road")).toBe(true);
    expect(sameName("Cafe\u0301", "CAF\u00c9")).toBe(true);
    expect(sameName("Library", "Libraries")).toBe(false);
  });
});
