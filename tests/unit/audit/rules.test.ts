import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { actionWords, auditAddress, fieldWords, readAuditQuery } from "@/lib/audit/rules";
import { ACTION_WORDS, AUDIT_AREAS } from "@/lib/audit/terms";

const LIB = path.resolve(import.meta.dirname, "../../../lib");

/** The sources of every command. */
function commandSources(folder = LIB): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const file = path.join(folder, entry.name);
    if (entry.isDirectory()) return commandSources(file);
    return /commands/.test(file) && file.endsWith(".ts") ? [readFileSync(file, "utf8")] : [];
  });
}

describe("the audit's words", () => {
  it("name every action that a command writes, and nothing else", () => {
    const sources = commandSources();
    expect(sources.length).toBeGreaterThan(40);
    const all = sources.join("\n");
    const unnamed = [...all.matchAll(/action: "([a-z-]+\.[a-z-]+)"/g)]
      .map((match) => match[1] ?? "")
      .filter((action) => !Object.hasOwn(ACTION_WORDS, action));
    expect(unnamed).toEqual([]);
    // An action may also be put together by a command that two endpoints share.
    const unused = Object.keys(ACTION_WORDS).filter((action) => !all.includes(`"${action}"`));
    expect(unused.filter((action) => !/^stock\.(merge|split|identify)$/.test(action))).toEqual([]);
  });

  it("have a place in the search for each area", () => {
    const areas = new Set(Object.keys(ACTION_WORDS).map((action) => action.split(".")[0]));
    expect([...areas].filter((area) => !Object.hasOwn(AUDIT_AREAS, area ?? ""))).toEqual([]);
  });

  it("are words a person reads; what has none is shown as it is", () => {
    expect(actionWords("weighing.correct")).toBe("Corrected a weigh-in");
    expect(actionWords("toString")).toBe("toString");
    expect(fieldWords("netGrams")).toBe("net grams");
    expect(fieldWords("weigh-in")).toBe("weigh in");
  });
});

describe("a search", () => {
  it("keeps what can be read of its address and leaves the rest", () => {
    expect(
      readAuditQuery({
        area: "weighing",
        actor: "nobody",
        from: "2026-02-30",
        to: "2026-05-06",
        text: "  crate ",
        before: "12x",
        other: "1",
      }),
    ).toEqual({ area: "weighing", to: "2026-05-06", text: "crate" });
    expect(readAuditQuery({ area: "", text: ["a", "b"] })).toEqual({});
  });

  it("is an address again, for the next page", () => {
    const query = readAuditQuery({ area: "weighing", text: "a&b" });
    expect(auditAddress(query, "17")).toBe("/audit?area=weighing&text=a%26b&before=17");
    expect(auditAddress({}, null)).toBe("/audit");
  });
});
