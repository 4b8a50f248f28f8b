/**
 * `npm test`: everything, from a fresh clone. Installs what is missing, then verify, integration, reference,
 * build and browser tests. The last line is the total; what cannot run counts as skipped.
 */
import { execFileSync } from "node:child_process";
import path from "node:path";
import { build } from "../../lib/cli/build.mjs";
import { installIfNeeded } from "../../lib/cli/install.mjs";
import { endWithSignals } from "../../lib/cli/own-processes.mjs";
import { LOGS, ROOT, cleanEnvironment, close, countPlaywright, runSteps, tell } from "./steps.mjs";
import { verifySteps, vitestStep } from "./verify-steps.mjs";

const PLAYWRIGHT = "node_modules/@playwright/test/cli.js";

/** Browser tests that cannot run: how many there are. */
function listedBrowserTests() {
  const listed = execFileSync(process.execPath, [PLAYWRIGHT, "test", "--list", "--reporter=json"], {
    cwd: ROOT,
    env: cleanEnvironment(),
    encoding: "utf8",
    maxBuffer: 64 * 1024 * 1024,
  });
  let count = 0;
  const walk = (suite) => {
    for (const spec of suite.specs ?? []) count += spec.tests.length;
    for (const inner of suite.suites ?? []) walk(inner);
  };
  for (const suite of JSON.parse(listed).suites) walk(suite);
  return count;
}

/** Says at once what stands instead of the browser tests. */
function without(failed, skipped, failures) {
  const outcome = { name: "e2e", passed: 0, failed, skipped, seconds: 0, failures, log: "" };
  tell(outcome);
  return outcome;
}

async function browserTests(browser, isBuilt) {
  if (!browser) return without(0, listedBrowserTests(), []);
  if (!isBuilt) return without(1, 0, ["there is no build to test"]);
  const report = path.join(LOGS, "e2e.json");
  const env = { CHROMIUM_PATH: browser, PLAYWRIGHT_JSON_OUTPUT_FILE: report };
  const step = { name: "e2e", report, count: countPlaywright, args: [PLAYWRIGHT, "test"], env };
  return (await runSteps([step], 1))[0];
}

const started = Date.now();
endWithSignals();
await installIfNeeded(ROOT);
// Loaded only now: it needs Playwright.
const { requireBrowser } = await import("./browser.mjs");
const browser = requireBrowser(console.log);
// Integration tests that print a page find it too.
if (browser) process.env.CHROMIUM_PATH = browser;

const outcomes = await runSteps(verifySteps(), 2);
outcomes.push(...(await runSteps([vitestStep("integration"), vitestStep("reference")], 1)));
const [built] = await runSteps([{ name: "build", run: (stdio) => build(ROOT, stdio) }], 1);
outcomes.push(built, await browserTests(browser, built.failed === 0));
process.exitCode = close(outcomes, started);
