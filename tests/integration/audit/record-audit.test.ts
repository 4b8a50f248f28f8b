import { afterEach, beforeEach, expect, it } from "vitest";
import { eraseAuditValuesIn, recordAudit } from "@/lib/audit/commands";
import { inTransaction } from "@/lib/platform/database";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
});
afterEach(() => scheme.close());

const all = (sql: string) => scheme.db.reader.client.prepare(sql).all();

it("names actor, action and record, and keeps personal values apart", () => {
  inTransaction(scheme, (tx) => {
    recordAudit(tx, scheme.ctx("lead"), {
      action: "points.rename",
      subjectKind: "point",
      subjectId: "p1",
      fields: { kind: "school" },
      personal: { host: "Maris Holm" },
      actId: 7,
    });
    recordAudit(tx, scheme.ctx("system"), {
      action: "jobs.tidy",
      subjectKind: "job",
      subjectId: "tidy",
      fields: {},
    });
  });
  expect(all("select * from audit_events")).toEqual([
    {
      id: 1,
      at: NOON,
      actor: scheme.people.lead,
      action: "points.rename",
      subject_kind: "point",
      subject_id: "p1",
      fields: '{"kind":"school"}',
      act_id: 7,
    },
    {
      id: 2,
      at: NOON,
      actor: null,
      action: "jobs.tidy",
      subject_kind: "job",
      subject_id: "tidy",
      fields: "{}",
      act_id: null,
    },
  ]);
  expect(all("select * from audit_values")).toEqual([
    { event_id: 1, field: "host", value: "Maris Holm" },
  ]);
});

it("empties the personal values of one record and leaves the rows", () => {
  const personal = (subjectId: string) => ({
    action: "people.invite",
    subjectKind: "person",
    subjectId,
    fields: {},
    personal: { name: subjectId },
  });
  inTransaction(scheme, (tx) => {
    recordAudit(tx, scheme.ctx(), personal("a"));
    recordAudit(tx, scheme.ctx(), personal("b"));
    eraseAuditValuesIn(tx, "person", "a");
  });
  expect(all("select value from audit_values order by event_id")).toEqual([
    { value: null },
    { value: "b" },
  ]);
  expect(all("select id from audit_events")).toHaveLength(2);
});

it("is undone with its transaction", () => {
  expect(() =>
    inTransaction(scheme, (tx) => {
      recordAudit(tx, scheme.ctx(), {
        action: "a.b",
        subjectKind: "x",
        subjectId: "y",
        fields: {},
      });
      throw new Error("rolled back");
    }),
  ).toThrow();
  expect(all("select 1 from audit_events")).toEqual([]);
});
