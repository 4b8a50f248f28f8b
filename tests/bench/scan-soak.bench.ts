/**
 * The scanner at work for half an hour: the built program's weigh-in page, a fake camera that shows another tag
 * every four seconds, and how much memory page, worker and process hold after five minutes and at the end.
 * `SCAN_SOAK_MINUTES=6 npm run bench scan-soak` for a shorter one.
 */
import fs from "node:fs";
import path from "node:path";
import { chromium, type Browser, type CDPSession, type Page } from "@playwright/test";
import { tagAddress, type LabelCode } from "@/lib/core/bag-code";
import { installedBrowser } from "@/tests/support/browser.mjs";
import { drawnTag } from "@/tests/support/drawn-tag";
import { startE2eServer } from "@/tests/support/e2e-server";
import { writeFilmOf } from "@/tests/support/film";
import type { BenchRow } from "./bench-row";

export const name = "scan-soak";
export const soak = true;

const MINUTES = Number(process.env.SCAN_SOAK_MINUTES ?? 30);
/** Until everything is loaded, compiled and warm. */
const FIRST_MINUTES = Math.min(5, MINUTES / 3);
const TAGS = 8;
const SECONDS_EACH = 4;
const FRAMES_A_SECOND = 10;
const MIB = 1024 * 1024;
const LOOKS = 9;
const LOOK_EVERY_MS = 3000;
/** Half of what the film would give. */
const LEAST_READS_A_MINUTE = 60 / SECONDS_EACH / 2;

type Memory = { page: number; worker: number; renderer: number; all: number };

/**
 * Memory that a process filled itself, in bytes: anonymous pages and memory shared with its siblings, by its share.
 * Not the program's code: that counts less while another browser of the machine has it mapped too.
 */
function filled(pid: number): number {
  const rollup = fs.readFileSync(`/proc/${pid}/smaps_rollup`, "utf8");
  const kib = (field: string): number => {
    const found = new RegExp(`^${field}:\\s+(\\d+) kB`, "m").exec(rollup)?.[1];
    if (found === undefined) throw new Error(`no ${field} in smaps_rollup`);
    return Number(found);
  };
  return (kib("Pss_Anon") + kib("Pss_Shmem")) * 1024;
}

/** JS heap of the scanner's worker after a collection, in bytes: CDP to a target inside the page's session. */
async function workerHeap(cdp: CDPSession, sessionId: string): Promise<number> {
  let id = 0;
  const ask = (method: string) =>
    new Promise<Record<string, number>>((resolve) => {
      const mine = (id += 1);
      const heard = (event: { sessionId: string; message: string }) => {
        const answer = JSON.parse(event.message) as {
          id?: number;
          result?: Record<string, number>;
        };
        if (event.sessionId !== sessionId || answer.id !== mine) return;
        cdp.off("Target.receivedMessageFromTarget", heard);
        resolve(answer.result ?? {});
      };
      cdp.on("Target.receivedMessageFromTarget", heard);
      void cdp.send("Target.sendMessageToTarget", {
        sessionId,
        message: JSON.stringify({ id: mine, method }),
      });
    });
  await ask("HeapProfiler.collectGarbage");
  return (await ask("Runtime.getHeapUsage")).usedSize ?? 0;
}

async function once(browser: Browser, cdp: CDPSession, worker: string): Promise<Memory> {
  // Twice, for what the first collection only lets go of.
  for (let round = 0; round < 2; round += 1) await cdp.send("HeapProfiler.collectGarbage");
  const { usedSize } = await cdp.send("Runtime.getHeapUsage");
  const inWorker = await workerHeap(cdp, worker);
  const whole = await browser.newBrowserCDPSession();
  const { processInfo } = await whole.send("SystemInfo.getProcessInfo");
  await whole.detach();
  const sizes = processInfo.map(({ id, type }) => ({ type, bytes: filled(id) }));
  const sum = (of: (type: string) => boolean) =>
    sizes.filter(({ type }) => of(type)).reduce((a, { bytes }) => a + bytes, 0);
  return {
    page: usedSize,
    worker: inWorker,
    renderer: sum((type) => type === "renderer"),
    all: sum(() => true),
  };
}

/** The median of some looks: frames are under way all the time, and each holds a few megabytes for a moment. */
async function measured(browser: Browser, cdp: CDPSession, worker: string): Promise<Memory> {
  const looks: Memory[] = [];
  for (let look = 0; look < LOOKS; look += 1) {
    if (look > 0) await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
    looks.push(await once(browser, cdp, worker));
  }
  const middle = (of: keyof Memory): number =>
    looks.map((look) => look[of]).sort((a, b) => a - b)[LOOKS >> 1] ?? 0;
  return {
    page: middle("page"),
    worker: middle("worker"),
    renderer: middle("renderer"),
    all: middle("all"),
  };
}

/** Tells the worker's session of the page's own. */
async function attachWorker(cdp: CDPSession): Promise<string> {
  const attached = new Promise<string>((resolve) => {
    cdp.on("Target.attachedToTarget", ({ sessionId, targetInfo }) => {
      if (targetInfo.type === "worker") resolve(sessionId);
    });
  });
  await cdp.send("Target.setAutoAttach", {
    autoAttach: true,
    waitForDebuggerOnStart: false,
    flatten: false,
  });
  return attached;
}

async function countReads(page: Page): Promise<() => Promise<number>> {
  await page.evaluate(() => {
    const field = document.querySelector<HTMLInputElement>("#weigh-in-code");
    const counted = { reads: 0, last: field?.value ?? "" };
    Object.assign(globalThis, { counted });
    setInterval(() => {
      if (!field || field.value === counted.last) return;
      counted.last = field.value;
      counted.reads += 1;
    }, 250);
  });
  return () =>
    page.evaluate(() => (globalThis as unknown as { counted: { reads: number } }).counted.reads);
}

const minutes = (count: number) => new Promise((resolve) => setTimeout(resolve, count * 60_000));

export async function run(): Promise<BenchRow[]> {
  const server = await startE2eServer("shed");
  const codes = server
    .query<{ code: LabelCode }>("select code from bags order by code limit ?", TAGS)
    .map(({ code }) => code);
  const film = path.join(server.folder, "tags.y4m");
  writeFilmOf(
    film,
    codes.map((code) => drawnTag(tagAddress("https://shed.example", code))),
    SECONDS_EACH * FRAMES_A_SECOND,
    FRAMES_A_SECOND,
  );
  const browser = await chromium.launch({
    executablePath: installedBrowser() ?? undefined,
    args: [
      "--no-sandbox",
      // A graphics process, as every phone has one. Without any, Chromium keeps each video frame that is drawn on a
      // canvas mapped: 10 MB a second from drawImage alone, with no code of ours on the page.
      "--use-gl=angle",
      "--use-angle=swiftshader",
      "--enable-unsafe-swiftshader",
      "--use-fake-ui-for-media-stream",
      "--use-fake-device-for-media-stream",
      `--use-file-for-fake-video-capture=${film}`,
    ],
  });
  try {
    const context = await browser.newContext({
      viewport: { width: 360, height: 740 },
      permissions: ["camera"],
    });
    await server.signIn(context, "volunteer");
    const page = await context.newPage();
    await page.goto(`${server.url}/weigh-in`);
    const cdp = await context.newCDPSession(page);
    const worker = attachWorker(cdp);
    await page.getByRole("button", { name: "Scan with the camera" }).click();
    await page.locator('[data-engine="wasm"]').waitFor({ timeout: 30_000 });
    const session = await worker;
    const reads = await countReads(page);
    await minutes(FIRST_MINUTES);
    const first = await measured(browser, cdp, session);
    console.log(`  after ${FIRST_MINUTES} min: ${await reads()} reads`, first);
    for (let passed = FIRST_MINUTES; passed < MINUTES; passed += 5) {
      await minutes(Math.min(5, MINUTES - passed));
      console.log(`  ${await reads()} reads`, await measured(browser, cdp, session));
    }
    const last = await measured(browser, cdp, session);
    const row = (figure: string, of: keyof Memory): BenchRow => ({
      figure: `${figure} after ${MINUTES} min`,
      value: last[of] / MIB,
      unit: "MiB",
      yardstick: { name: `after ${FIRST_MINUTES} min`, value: first[of] / MIB },
      most: 1.1,
    });
    return [
      row("page's JS heap", "page"),
      row("worker's JS heap", "worker"),
      row("page's process", "renderer"),
      row("all of the browser", "all"),
      {
        figure: "tags read a minute",
        value: (await reads()) / MINUTES,
        unit: "reads",
        least: LEAST_READS_A_MINUTE,
      },
    ];
  } finally {
    await browser.close();
    await server.close();
  }
}
