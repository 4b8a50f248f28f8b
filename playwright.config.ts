import { defineConfig } from "@playwright/test";
import { installedBrowser } from "./tests/support/browser.mjs";

/** Each spec starts the built program on its own database (tests/support/e2e-server.ts); one at a time. */
export default defineConfig({
  testDir: "tests/e2e",
  testMatch: "**/*.spec.ts",
  outputDir: "test-results",
  workers: 1,
  retries: 0,
  forbidOnly: Boolean(process.env.CI),
  timeout: 180_000,
  expect: { timeout: 10_000 },
  globalTimeout: 25 * 60_000,
  reporter: [
    ["list"],
    ["json", { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ?? ".cache/logs/e2e.json" }],
  ],
  use: {
    browserName: "chromium",
    viewport: { width: 360, height: 740 },
    locale: "en-GB",
    timezoneId: "UTC",
    trace: "retain-on-failure",
    launchOptions: {
      executablePath: installedBrowser() ?? undefined,
      args: ["--no-sandbox"],
    },
  },
});
