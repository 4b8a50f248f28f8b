/** The steps of verify and test: each a program of its own with its log, counted from its JSON report. */
import fs from "node:fs";
import path from "node:path";
import { runToEnd } from "../../lib/cli/own-processes.mjs";

export const ROOT = path.resolve(import.meta.dirname, "../..");
export const LOGS = path.join(ROOT, ".cache/logs");

/** Settings of the shell must not leak into what is tested. */
const OURS =
  /^(BISMAR_|NEXTAUTH_|MAIL_|SMTP_|STORAGE_|UPLOADTHING_|VITEST|PLAYWRIGHT_)|^(DATABASE_FILE|PUBLIC_URL|PORT|HOST|NODE_ENV|TRUSTED_PROXY)$/;

export function cleanEnvironment(extra = {}) {
  const kept = Object.entries(process.env).filter(([name]) => !OURS.test(name));
  return { ...Object.fromEntries(kept), NEXT_TELEMETRY_DISABLED: "1", ...extra };
}

/**
 * What one step came to.
 *
 * @typedef {{ name: string, passed: number, failed: number, skipped: number, seconds: number, failures: string[], log: string }} Outcome
 */

/** A program that either passes or fails: one check. */
export function countExitCode(code) {
  return { passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, skipped: 0, failures: [] };
}

/** vitest's JSON report; a file that could not even be read counts as one failure. */
export function countVitest(report) {
  const outcome = { passed: 0, failed: 0, skipped: 0, failures: [] };
  for (const file of report.testResults) {
    const name = path.relative(ROOT, file.name);
    for (const test of file.assertionResults) {
      if (test.status === "passed") outcome.passed += 1;
      else if (test.status === "failed") {
        outcome.failed += 1;
        outcome.failures.push(`${name}: ${test.fullName}`);
      } else outcome.skipped += 1;
    }
    const counted = file.assertionResults.some((test) => test.status === "failed");
    if (file.status === "failed" && !counted) {
      outcome.failed += 1;
      outcome.failures.push(`${name}: ${String(file.message).split("\n")[0]}`);
    }
  }
  return outcome;
}

/** Playwright's JSON report; a test that passed at its second try counts as failed. */
export function countPlaywright(report) {
  const outcome = { passed: 0, failed: 0, skipped: 0, failures: [] };
  const walk = (suite, trail) => {
    for (const spec of suite.specs ?? []) {
      for (const test of spec.tests) {
        if (test.status === "expected") outcome.passed += 1;
        else if (test.status === "skipped") outcome.skipped += 1;
        else {
          outcome.failed += 1;
          outcome.failures.push([...trail, spec.title].join(" > "));
        }
      }
    }
    for (const inner of suite.suites ?? []) walk(inner, [...trail, inner.title]);
  };
  for (const suite of report.suites) walk(suite, [suite.title]);
  for (const error of report.errors ?? []) {
    outcome.failed += 1;
    outcome.failures.push(String(error.message).split("\n")[0]);
  }
  return outcome;
}

/**
 * @param {{ name: string, args?: string[], run?: (stdio: unknown) => Promise<number>, env?: object,
 *   report?: string, count?: (report: unknown) => object }} step args are for this Node; report is a JSON
 *   file that the step writes
 * @returns {Promise<Outcome>}
 */
export async function runStep(step) {
  fs.mkdirSync(LOGS, { recursive: true });
  const log = path.join(LOGS, `${step.name}.log`);
  const out = fs.openSync(log, "w");
  const stdio = ["ignore", out, out];
  if (step.report) fs.rmSync(step.report, { force: true });
  const started = Date.now();
  const code = step.run
    ? await step.run(stdio)
    : await runToEnd(process.execPath, step.args, {
        cwd: ROOT,
        env: cleanEnvironment(step.env),
        stdio,
      });
  fs.closeSync(out);
  let counted;
  if (step.report && step.count) {
    counted = fs.existsSync(step.report)
      ? step.count(JSON.parse(fs.readFileSync(step.report, "utf8")))
      : { passed: 0, failed: 1, skipped: 0, failures: ["it wrote no report"] };
    if (code !== 0 && counted.failed === 0) {
      counted.failed = 1;
      counted.failures.push(`it ended with exit code ${code}`);
    }
    if (counted.passed + counted.failed === 0) {
      counted.failed = 1;
      counted.failures.push("it ran no test");
    }
  } else counted = countExitCode(code);
  return { name: step.name, ...counted, seconds: (Date.now() - started) / 1000, log };
}

/** One line for a step, and what failed in it with the end of its log. */
export function tell(outcome) {
  const skipped = outcome.skipped > 0 ? `, ${outcome.skipped} skipped` : "";
  const mark = outcome.failed > 0 ? "FAILED" : "ok";
  console.log(
    `${outcome.name.padEnd(14)} ${mark.padEnd(7)} ${String(outcome.passed).padStart(5)} passed, ` +
      `${outcome.failed} failed${skipped}  (${outcome.seconds.toFixed(1)} s)`,
  );
  if (outcome.failed === 0) return;
  for (const failure of outcome.failures.slice(0, 40)) console.log(`    ${failure}`);
  if (outcome.log && fs.existsSync(outcome.log)) {
    const lines = fs.readFileSync(outcome.log, "utf8").trimEnd().split("\n");
    console.log(`    The end of ${path.relative(ROOT, outcome.log)}:`);
    for (const line of lines.slice(-60)) console.log(`    | ${line}`);
  }
}

/**
 * Runs steps, so many at a time, in their order; tells each as it ends.
 *
 * @returns {Promise<Outcome[]>}
 */
export async function runSteps(steps, atOnce) {
  const outcomes = [];
  const waiting = [...steps];
  const lane = async () => {
    for (let step = waiting.shift(); step; step = waiting.shift()) {
      const outcome = await runStep(step);
      outcomes.push(outcome);
      tell(outcome);
    }
  };
  await Promise.all(Array.from({ length: atOnce }, lane));
  return outcomes;
}

/**
 * The totals, and as the very last line "N passed, N failed".
 *
 * @returns {number} the exit code
 */
export function close(outcomes, started) {
  const sum = (key) => outcomes.reduce((total, outcome) => total + outcome[key], 0);
  console.log("");
  console.log(
    `${"step".padEnd(14)} ${"passed".padStart(7)} ${"failed".padStart(7)} ${"skipped".padStart(8)} ${"seconds".padStart(8)}`,
  );
  for (const outcome of outcomes) {
    console.log(
      `${outcome.name.padEnd(14)} ${String(outcome.passed).padStart(7)} ${String(outcome.failed).padStart(7)} ` +
        `${String(outcome.skipped).padStart(8)} ${outcome.seconds.toFixed(1).padStart(8)}`,
    );
  }
  console.log(
    `${"in all".padEnd(14)} ${" ".repeat(24)} ${((Date.now() - started) / 1000).toFixed(1).padStart(8)}`,
  );
  console.log("");
  const skipped = sum("skipped");
  console.log(
    `${sum("passed")} passed, ${sum("failed")} failed${skipped > 0 ? `, ${skipped} skipped` : ""}`,
  );
  return sum("failed") > 0 || sum("passed") === 0 ? 1 : 0;
}
