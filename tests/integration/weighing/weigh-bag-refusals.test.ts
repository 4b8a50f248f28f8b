import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError, type ErrorCode } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { sentence } from "@/lib/core/messages";
import { weighingDesk, type WeighingDesk } from "@/tests/support/weighing-desk";
import { NOON } from "@/tests/support/scheme";

let desk: WeighingDesk;
beforeEach(() => {
  desk = weighingDesk();
});
afterEach(() => desk.close());

const rows = <T>(sql: string, ...values: unknown[]): T[] =>
  desk.db.reader.client.prepare(sql).all(...values) as T[];
const count = (table: string): number =>
  rows<{ n: number }>(`select count(*) as n from ${table}`)[0]?.n ?? -1;

describe("bad input, each with its own sentence", () => {
  type Case = [ErrorCode, string, (code: string) => unknown];
  const cases: Case[] = [
    ["unknown-code", "No tag of this scheme has the code 0000-000H.", () => desk.weigh("0000000H")],
    ["not-a-bag", "on the label of a container", () => desk.weigh(desk.crate.labelCode ?? "")],
    [
      "tare-above-gross",
      "Container and sack weigh 1.620 kg, more than the 1.000 kg on the scale.",
      (code) => desk.weigh(code, { grossMilligrams: 1_000_000 }),
    ],
    [
      "above-max",
      "Bench scale carries at most 15.000 kg; 15.005 kg cannot be read on it.",
      (code) => desk.weigh(code, { grossMilligrams: 15_005_000 }),
    ],
    [
      "not-a-step",
      "The scale shows steps of 5 g. 2.343 kg cannot be right. Nothing was saved; read it again.",
      (code) => desk.weigh(code, { grossMilligrams: 2_343_000 }),
    ],
    [
      "net-zero",
      "Nothing is left after the tare.",
      (code) => desk.weigh(code, { grossMilligrams: 1_620_000 }),
    ],
    [
      "too-long-ago",
      "31 December 2025 is before this scheme began.",
      (code) => desk.weigh(code, {}, { occurredAt: Date.UTC(2025, 11, 31, 12) }),
    ],
    [
      "one-kind-needs-material",
      "needs its resin code, kind and colour",
      (code) => desk.weigh(code, {}, { oneKind: true, kind: "lids", colourCode: "blue" }),
    ],
    [
      "unknown-colour",
      "not in the palette",
      (code) => desk.weigh(code, {}, { colourCode: "ultraviolet" }),
    ],
    [
      "unknown-scale",
      "scale is not in the list",
      (code) => desk.weigh(code, {}, { scaleId: newId(NOON) }),
    ],
    [
      "unknown-container",
      "container or sack is not in the list",
      (code) => desk.weigh(code, { sackId: desk.crate.id }),
    ],
    [
      "unknown-point",
      "drop-off point is not in the list",
      () => desk.weigh(desk.tags(1, null)[0] ?? "", {}, { pointId: newId(NOON) }),
    ],
  ];

  it.each(cases)("%s: %s", (code, words, work) => {
    const [tag = ""] = desk.tags(1);
    if (code === "unknown-point") desk.tags(1, null);
    const wrong = ((): AppError => {
      try {
        work(tag);
      } catch (error) {
        if (error instanceof AppError) return error;
        throw error;
      }
      throw new Error("nothing was refused");
    })();
    expect(wrong.code).toBe(code);
    expect(sentence(wrong.code, wrong.detail)).toContain(words);
    expect(wrong.path.length).toBeGreaterThan(0);
    expect([count("entries"), count("weigh_ins")]).toEqual([0, 0]);
    expect(rows("select state from bags where code = ?", tag)).toEqual([{ state: "printed" }]);
  });
});
