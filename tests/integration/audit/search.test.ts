import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { eraseAuditValuesIn, recordAudit } from "@/lib/audit/commands";
import { searchAuditSchema } from "@/lib/audit/contract";
import { listActors, searchAudit } from "@/lib/audit/queries";
import { AppError } from "@/lib/core/errors";
import { instant } from "@/lib/core/time";
import { inTransaction } from "@/lib/platform/database";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const DAY = 86_400_000;
let scheme: TestScheme;

beforeEach(() => {
  scheme = newScheme();
  const write = (
    who: "lead" | "volunteer",
    daysLater: number,
    action: string,
    subjectId: string,
    personal?: Record<string, string>,
  ) => {
    const ctx = scheme.ctx(who, instant(NOON + daysLater * DAY));
    inTransaction(ctx, (tx) =>
      recordAudit(tx, ctx, {
        action,
        subjectKind: "weigh-in",
        subjectId,
        fields: { netGrams: 2160, wet: false },
        ...(personal ? { personal } : {}),
        actId: 7,
      }),
    );
  };
  write("volunteer", 0, "weighing.record", "one");
  write("lead", 1, "weighing.correct", "one", { reason: "The Crate was read twice" });
  write("volunteer", 2, "sorting.close", "two");
});
afterEach(() => scheme.close());

const search = (query: Record<string, string> = {}) =>
  searchAudit(scheme.ctx("coordinator"), searchAuditSchema.parse(query));
const actions = (query?: Record<string, string>) => search(query).rows.map(({ action }) => action);

describe("searching the audit", () => {
  it("shows who did what, when and what changed, newest first", () => {
    expect(actions()).toEqual(["sorting.close", "weighing.correct", "weighing.record"]);
    const [, corrected] = search().rows;
    expect(corrected).toMatchObject({
      at: NOON + DAY,
      actor: { id: scheme.people.lead },
      subjectKind: "weigh-in",
      subjectId: "one",
      fields: { netGrams: 2160, wet: false },
      personal: [{ field: "reason", value: "The Crate was read twice" }],
      actId: 7,
    });
  });

  it("finds by area, person, days and words, also written ones", () => {
    expect(actions({ area: "weighing" })).toEqual(["weighing.correct", "weighing.record"]);
    // "weigh" is no area: a part of one finds nothing of it.
    expect(actions({ area: "weigh" })).toEqual([]);
    expect(actions({ actor: scheme.people.lead })).toEqual(["weighing.correct"]);
    expect(actions({ from: "2026-05-07", to: "2026-05-07" })).toEqual(["weighing.correct"]);
    expect(actions({ text: "CRATE" })).toEqual(["weighing.correct"]);
    expect(actions({ text: "two" })).toEqual(["sorting.close"]);
    expect(actions({ text: "100%" })).toEqual([]);
  });

  it("keeps the row of an erased value and says that it is erased", () => {
    inTransaction(scheme, (tx) => eraseAuditValuesIn(tx, "weigh-in", "one"));
    expect(search({ area: "weighing" }).rows[0]?.personal).toEqual([
      { field: "reason", value: null },
    ]);
    expect(actions({ text: "crate" })).toEqual([]);
  });

  it("goes on page by page, each row once", () => {
    const ctx = scheme.ctx("lead");
    inTransaction(ctx, (tx) => {
      for (let count = 0; count < 120; count += 1) {
        recordAudit(tx, ctx, {
          action: "stock.count",
          subjectKind: "count",
          subjectId: String(count),
          fields: {},
        });
      }
    });
    const found: string[] = [];
    let before: string | null = null;
    do {
      const page = search({ area: "stock", ...(before === null ? {} : { before }) });
      found.push(...page.rows.map(({ subjectId }) => subjectId));
      before = page.next;
    } while (before !== null);
    expect(found).toEqual(Array.from({ length: 120 }, (_, at) => String(119 - at)));
  });

  it("is the coordinator's alone", () => {
    expect(() => searchAudit(scheme.ctx("lead"), {})).toThrow(AppError);
    expect(
      listActors(scheme.ctx("coordinator"))
        .map(({ id }) => id)
        .sort(),
    ).toEqual([scheme.people.lead, scheme.people.volunteer].sort());
  });
});
