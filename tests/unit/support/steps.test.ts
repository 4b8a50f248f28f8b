/** The counting behind the last line of `npm test`: a failure that it overlooked would be believed. */
import path from "node:path";
import { describe, expect, it } from "vitest";
import { countPlaywright, countVitest } from "../../support/steps.mjs";

const ROOT = path.resolve(import.meta.dirname, "../../..");

describe("counting vitest's report", () => {
  it("counts passed, failed and skipped tests, and names the failed", () => {
    const report = {
      testResults: [
        {
          name: path.join(ROOT, "tests/unit/core/mass.test.ts"),
          status: "failed",
          assertionResults: [
            { status: "passed", fullName: "mass adds" },
            { status: "failed", fullName: "mass splits" },
            { status: "pending", fullName: "mass waits" },
            { status: "todo", fullName: "mass comes later" },
          ],
        },
      ],
    };
    expect(countVitest(report)).toEqual({
      passed: 1,
      failed: 1,
      skipped: 2,
      failures: ["tests/unit/core/mass.test.ts: mass splits"],
    });
  });

  it("counts a file that could not be read, though it holds no failed test", () => {
    const report = {
      testResults: [
        {
          name: path.join(ROOT, "tests/unit/a.test.ts"),
          status: "failed",
          message: "Cannot find module\nat line 1",
          assertionResults: [],
        },
        {
          name: path.join(ROOT, "tests/unit/b.test.ts"),
          status: "failed",
          message: "beforeAll failed",
          assertionResults: [{ status: "skipped", fullName: "never ran" }],
        },
      ],
    };
    expect(countVitest(report)).toEqual({
      passed: 0,
      failed: 2,
      skipped: 1,
      failures: [
        "tests/unit/a.test.ts: Cannot find module",
        "tests/unit/b.test.ts: beforeAll failed",
      ],
    });
  });
});

describe("counting Playwright's report", () => {
  it("counts through all suites; flaky is failed; errors outside tests count", () => {
    const report = {
      suites: [
        {
          title: "weigh.spec.ts",
          specs: [{ title: "opens", tests: [{ status: "expected" }] }],
          suites: [
            {
              title: "weighing",
              specs: [
                { title: "saves", tests: [{ status: "unexpected" }] },
                { title: "scans", tests: [{ status: "flaky" }] },
                { title: "waits", tests: [{ status: "skipped" }] },
              ],
            },
          ],
        },
      ],
      errors: [{ message: "no server\nstack" }],
    };
    expect(countPlaywright(report)).toEqual({
      passed: 1,
      failed: 3,
      skipped: 1,
      failures: [
        "weigh.spec.ts > weighing > saves",
        "weigh.spec.ts > weighing > scans",
        "no server",
      ],
    });
  });
});
