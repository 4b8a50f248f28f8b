/**
 * What the weigh-in page costs a phone: the script that really travels, beside the framework's own bare page;
 * the scan engine that comes later; and, with the processor slowed four times and 1.6 Mbit/s, the largest paint
 * and the time from a tap to the shown choice.
 */
import { chromium, type Browser, type CDPSession, type Page } from "@playwright/test";
import { startE2eServer, type E2eServer } from "@/tests/support/e2e-server";
import { installedBrowser } from "@/tests/support/browser.mjs";
import type { BenchRow } from "./bench-row";
import { startBareNext } from "./servers";

export const name = "page-weight";
export const soak = false;

const PHONE = { width: 360, height: 740 };
const SLOWDOWN = 4;
/** 1.6 Mbit/s down, 0.75 up, 150 ms there and back. */
const SLOW_NET = {
  offline: false,
  downloadThroughput: 200_000,
  uploadThroughput: 93_750,
  latency: 150,
};
const KIB = 1024;
const ROUNDS = 5;

const median = (values: number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

/** Bytes of script that came over the wire, by address. */
async function countScripts(page: Page): Promise<{ cdp: CDPSession; bytes: Map<string, number> }> {
  const cdp = await page.context().newCDPSession(page);
  await cdp.send("Network.enable");
  await cdp.send("Network.setCacheDisabled", { cacheDisabled: true });
  const scripts = new Map<string, string>();
  const bytes = new Map<string, number>();
  cdp.on("Network.responseReceived", ({ requestId, response }) => {
    if (/javascript/.test(response.mimeType)) scripts.set(requestId, response.url);
  });
  cdp.on("Network.loadingFinished", ({ requestId, encodedDataLength }) => {
    const url = scripts.get(requestId);
    if (url) bytes.set(url, encodedDataLength);
  });
  return { cdp, bytes };
}

const sum = (bytes: ReadonlyMap<string, number>): number =>
  [...bytes.values()].reduce((a, b) => a + b, 0);

async function settled(page: Page): Promise<void> {
  await page.waitForLoadState("networkidle");
  await page.waitForTimeout(1500);
}

async function scriptsOf(
  browser: Browser,
  url: string,
  server?: E2eServer,
): Promise<{ before: number; engine: number }> {
  const context = await browser.newContext({ viewport: PHONE, permissions: ["camera"] });
  if (server) await server.signIn(context, "volunteer");
  const page = await context.newPage();
  const { bytes } = await countScripts(page);
  await page.goto(url);
  await settled(page);
  const before = sum(bytes);
  if (server) {
    await page.getByRole("button", { name: /scan/i }).first().click();
    await page.waitForTimeout(4000);
  }
  const engine = sum(bytes) - before;
  await context.close();
  return { before, engine };
}

async function slowed(browser: Browser, server: E2eServer): Promise<{ lcp: number; tap: number }> {
  const context = await browser.newContext({ viewport: PHONE, hasTouch: true });
  await server.signIn(context, "volunteer");
  const page = await context.newPage();
  const cdp = await context.newCDPSession(page);
  await cdp.send("Network.enable");
  await cdp.send("Network.setCacheDisabled", { cacheDisabled: true });
  await cdp.send("Network.emulateNetworkConditions", SLOW_NET);
  await cdp.send("Emulation.setCPUThrottlingRate", { rate: SLOWDOWN });
  await page.goto(`${server.url}/weigh-in`);
  await settled(page);
  const lcp = await page.evaluate(
    () =>
      new Promise<number>((resolve) => {
        new PerformanceObserver((list) =>
          resolve(list.getEntries().at(-1)?.startTime ?? 0),
        ).observe({
          type: "largest-contentful-paint",
          buffered: true,
        });
      }),
  );
  const taps: number[] = [];
  for (const resin of ["HDPE", "PP", "LDPE", "HDPE", "PET"]) {
    const tile = page
      .locator("label")
      .filter({ hasText: new RegExp(resin) })
      .first();
    await tile.scrollIntoViewIfNeeded();
    taps.push(
      await tile.evaluate(
        (element) =>
          new Promise<number>((resolve) => {
            const started = performance.now();
            (element as HTMLElement).click();
            requestAnimationFrame(() =>
              requestAnimationFrame(() => resolve(performance.now() - started)),
            );
          }),
      ),
    );
  }
  await context.close();
  return { lcp, tap: median(taps) };
}

export async function run(): Promise<BenchRow[]> {
  const executablePath = installedBrowser();
  if (!executablePath) throw new Error("No Chromium is installed; npm test gets one.");
  const server = await startE2eServer("shed");
  const bare = await startBareNext(server.databaseFile);
  const browser = await chromium.launch({
    executablePath,
    args: ["--no-sandbox", "--use-fake-device-for-media-stream", "--use-fake-ui-for-media-stream"],
  });
  try {
    const own = await scriptsOf(browser, `${server.url}/weigh-in`, server);
    const floor = await scriptsOf(browser, bare.url);
    const slow: { lcp: number; tap: number }[] = [];
    for (let round = 0; round < ROUNDS; round += 1) slow.push(await slowed(browser, server));
    return [
      {
        figure: "weigh-in page: script transferred",
        value: own.before / KIB,
        unit: "KiB",
        yardstick: { name: "the framework's bare page", value: floor.before / KIB },
      },
      {
        figure: "weigh-in page: script beyond the bare page",
        value: (own.before - floor.before) / KIB,
        unit: "KiB",
        most: 50,
      },
      {
        figure: "scan engine, loaded when the camera starts",
        value: own.engine / KIB,
        unit: "KiB",
      },
      {
        figure: "largest paint, processor slowed 4 times, 1.6 Mbit/s",
        value: median(slow.map((s) => s.lcp)),
        unit: "ms",
      },
      {
        figure: "tap to shown choice, processor slowed 4 times",
        value: median(slow.map((s) => s.tap)),
        unit: "ms",
      },
    ];
  } finally {
    await browser.close();
    await Promise.all([server.close(), bare.close()]);
  }
}
