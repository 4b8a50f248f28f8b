/**
 * The five cases that every command has: does it; refuses the wrong role; refuses the wrong state; replays by
 * request id; leaves one audit row.
 */
import { afterEach, beforeEach, expect, it } from "vitest";
import { AppError, type ErrorCode } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import type { Context } from "@/lib/platform/context";
import { newScheme, NOON, type TestScheme } from "./scheme";

type Cases<Input extends { requestId: string }, Given extends Input, Answer> = {
  command: (ctx: Context, input: Input) => Answer;
  by: Role;
  /** A role that may not. */
  notBy: Role;
  /** Prepares the scheme and gives an input that works there. */
  input: (scheme: TestScheme) => Given;
  does: (scheme: TestScheme, answer: NoInfer<Answer>, input: NoInfer<Given>) => void;
  /** An input that the scheme's state refuses, and with which code. */
  wrongState: (scheme: TestScheme) => { input: NoInfer<Input>; code: ErrorCode };
  action: string;
};

/** The code of the AppError that a call throws; fails when it throws none. */
export function refusalOf(call: () => unknown): ErrorCode {
  try {
    call();
  } catch (error) {
    if (error instanceof AppError) return error.code;
    throw error;
  }
  throw new Error("it was not refused");
}

/** Audit rows so far, newest last. */
export function auditRows(scheme: TestScheme): { action: string; actor: string | null }[] {
  return scheme.db.reader.client
    .prepare("select action, actor from audit_events order by id")
    .all() as { action: string; actor: string | null }[];
}

/** Declares the five cases inside a describe block. */
export function commandCases<Input extends { requestId: string }, Given extends Input, Answer>(
  cases: Cases<Input, Given, Answer>,
): void {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
  });
  afterEach(() => scheme.close());

  it("does it", () => {
    const input = cases.input(scheme);
    cases.does(scheme, cases.command(scheme.ctx(cases.by, NOON, input), input), input);
  });

  it(`refuses a ${cases.notBy}, and nobody`, () => {
    const input = cases.input(scheme);
    const before = auditRows(scheme).length;
    const as = (who: Role | "nobody") => refusalOf(() => cases.command(scheme.ctx(who), input));
    expect(as(cases.notBy)).toBe("forbidden");
    expect(as("nobody")).toBe("signed-out");
    expect(auditRows(scheme)).toHaveLength(before);
  });

  it("refuses the wrong state, and keeps nothing", () => {
    const { input, code } = cases.wrongState(scheme);
    const before = auditRows(scheme).length;
    expect(refusalOf(() => cases.command(scheme.ctx(cases.by, NOON, input), input))).toBe(code);
    expect(auditRows(scheme)).toHaveLength(before);
  });

  it("answers the same request the same, and does it once", () => {
    const input = cases.input(scheme);
    const ctx = () => scheme.ctx(cases.by, NOON, input);
    const first = cases.command(ctx(), input);
    const rows = auditRows(scheme).length;
    expect(cases.command(ctx(), input)).toEqual(first);
    expect(auditRows(scheme)).toHaveLength(rows);
    const other = scheme.ctx(cases.by, NOON, { ...input, somethingElse: newId() });
    expect(refusalOf(() => cases.command(other, input))).toBe("request-id-reused");
  });

  it("leaves one audit row in the actor's name", () => {
    const input = cases.input(scheme);
    const before = auditRows(scheme).length;
    cases.command(scheme.ctx(cases.by, NOON, input), input);
    expect(auditRows(scheme).slice(before)).toEqual([
      { action: cases.action, actor: scheme.people[cases.by] },
    ]);
  });
}
