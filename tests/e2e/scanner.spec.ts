/** The scanner on the built program, under its real policies: a filmed tag, a photo, a hand scanner, and no camera left on. */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { chromium, expect, test, type Browser, type Page } from "@playwright/test";
import sharp from "sharp";
import { drawCode, formatCode, tagAddress, type LabelCode } from "@/lib/core/bag-code";
import { installedBrowser } from "../support/browser.mjs";
import { drawnTag } from "../support/drawn-tag";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { writeFilmOf } from "../support/film";
import { codeField, gross, shown, weighInDesk } from "../support/weigh-in-page";

const SHED = "https://shed.example";
/** Of a good form, and on no tag. */
const STRANGER = drawCode((below) => below - 1);

let server: E2eServer;
let desk: ReturnType<typeof weighInDesk>;
let folder: string;
let phone: Browser;
let code: LabelCode;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  desk = weighInDesk(server);
  code = desk.nextCode() as LabelCode;
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-film-"));
  const film = path.join(folder, "tags.y4m");
  const texts = [tagAddress(SHED, code), "MENU 14", tagAddress(SHED, STRANGER)];
  writeFilmOf(
    film,
    texts.map((text) => drawnTag(text)),
    30,
    10,
  );
  phone = await chromium.launch({
    executablePath: installedBrowser() ?? undefined,
    args: [
      "--no-sandbox",
      "--use-fake-ui-for-media-stream",
      "--use-fake-device-for-media-stream",
      `--use-file-for-fake-video-capture=${film}`,
    ],
  });
});
test.afterAll(async () => {
  await phone.close();
  fs.rmSync(folder, { recursive: true, force: true });
  await server.close();
});

/** What the page does with camera and sound, for the test to ask. */
type Watched = { tracks: MediaStreamTrack[]; tones: number[] };

function watch(): void {
  const watched: Watched = { tracks: [], tones: [] };
  Object.assign(globalThis, { watched });
  if (!("mediaDevices" in navigator)) return;
  const ask = navigator.mediaDevices.getUserMedia.bind(navigator.mediaDevices);
  navigator.mediaDevices.getUserMedia = async (wanted) => {
    const stream = await ask(wanted);
    watched.tracks.push(...stream.getTracks());
    return stream;
  };
  const start = OscillatorNode.prototype.start;
  OscillatorNode.prototype.start = function (when?: number) {
    watched.tones.push(this.frequency.value);
    start.call(this, when);
  };
}

const inPage = (page: Page) => ({
  live: () =>
    page.evaluate(
      () =>
        (globalThis as unknown as { watched: Watched }).watched.tracks.filter(
          ({ readyState }) => readyState === "live",
        ).length,
    ),
  taken: () =>
    page.evaluate(() => (globalThis as unknown as { watched: Watched }).watched.tracks.length),
  tones: () => page.evaluate(() => (globalThis as unknown as { watched: Watched }).watched.tones),
});

async function openDesk(): Promise<Page> {
  const context = await phone.newContext({
    viewport: { width: 360, height: 740 },
    permissions: ["camera"],
  });
  await context.addInitScript(watch);
  const page = await context.newPage();
  await desk.open(page);
  return page;
}
const camera = (page: Page) => page.locator("[data-camera]");
const startCamera = (page: Page) =>
  page.getByRole("button", { name: "Scan with the camera" }).click();
const stopCamera = (page: Page) => page.getByRole("button", { name: "Stop the camera" }).click();

test("reads a filmed tag in a worker, and the page itself may run no WebAssembly", async () => {
  const page = await openDesk();
  const refused: string[] = [];
  const foreign: string[] = [];
  page.on("console", (message) => {
    if (/Content Security Policy/i.test(message.text())) refused.push(message.text());
  });
  page.on("request", (request) => {
    const url = new URL(request.url());
    if (url.protocol.startsWith("http") && url.origin !== server.url) foreign.push(url.href);
  });
  const answer = await page.request.get(`${server.url}/scanner/scan-worker.js`);
  expect(answer.headers()["content-security-policy"]).toContain("'wasm-unsafe-eval'");
  await startCamera(page);
  await expect(camera(page)).toHaveAttribute("data-engine", "wasm", { timeout: 20_000 });
  await expect(codeField(page)).toHaveValue(shown(code), { timeout: 20_000 });
  await expect(page.getByText("Harbour Road Library").first()).toBeVisible();
  await expect(page.getByText("0 bags today")).toBeVisible();
  expect(refused).toEqual([]);
  expect(foreign).toEqual([]);
  const compiled = page.evaluate(() =>
    WebAssembly.compile(Uint8Array.from([0, 97, 115, 109, 1, 0, 0, 0])).then(
      () => "compiled",
      (error: unknown) => String(error),
    ),
  );
  expect(await compiled).toMatch(/^CompileError/);
  await page.context().close();
});

test("marks and sounds a tag that is read and one that is not known, each in its way", async () => {
  const page = await openDesk();
  await startCamera(page);
  await expect(page.locator('[data-mark="Read"]')).toBeVisible({ timeout: 20_000 });
  await expect(page.locator('[data-mark="Not known"]')).toBeVisible({ timeout: 20_000 });
  await expect(
    page.getByText(
      new RegExp(
        `That is no tag of this scheme|No tag of this scheme has the code ${formatCode(STRANGER)}`,
      ),
    ),
  ).toBeVisible();
  const tones = new Set(await inPage(page).tones());
  expect([880, 1320, 240, 200].filter((hertz) => !tones.has(hertz))).toEqual([]);

  await page.getByRole("button", { name: "Sound off" }).click();
  const before = (await inPage(page).tones()).length;
  await expect(page.locator("[data-mark]")).toHaveCount(0);
  await expect(page.locator("[data-mark]")).toBeVisible({ timeout: 20_000 });
  expect(await inPage(page).tones()).toHaveLength(before);
  await page.reload();
  await expect(gross(page)).toBeVisible();
  await startCamera(page);
  await expect(page.getByRole("button", { name: "Sound on" })).toBeVisible();
  await page.context().close();
});

test("holds one camera at most, and none after stopping, leaving or hiding the page", async () => {
  const page = await openDesk();
  const { live, taken } = inPage(page);
  await startCamera(page);
  await expect(camera(page)).toHaveAttribute("data-camera", "on");
  expect(await live()).toBe(1);
  await stopCamera(page);
  await expect.poll(live).toBe(0);

  // On and off faster than a camera starts.
  for (let press = 0; press < 3; press += 1) {
    await startCamera(page);
    await stopCamera(page);
  }
  await startCamera(page);
  await expect(camera(page)).toHaveAttribute("data-camera", "on");
  await expect.poll(live).toBe(1);
  await expect(page.locator("video")).toHaveCount(1);

  const hide = (state: "hidden" | "visible") =>
    page.evaluate((now) => {
      Object.defineProperty(document, "visibilityState", { configurable: true, value: now });
      document.dispatchEvent(new Event("visibilitychange"));
    }, state);
  await hide("hidden");
  await expect.poll(live).toBe(0);
  await hide("visible");
  await expect(camera(page)).toHaveAttribute("data-camera", "on");
  expect(await live()).toBe(1);

  // The system takes the camera away, as for a call: it is taken back.
  const before = await taken();
  await page.evaluate(() => {
    const { tracks } = (globalThis as unknown as { watched: Watched }).watched;
    tracks.at(-1)?.dispatchEvent(new Event("ended"));
  });
  await expect.poll(taken).toBe(before + 1);
  await expect.poll(live).toBe(1);

  await page.getByRole("link", { name: "Stock" }).first().click();
  await expect(page).toHaveURL(/\/stock/);
  await expect.poll(live).toBe(0);
  await page.context().close();
});

test("reads with html5-qrcode where no WebAssembly arrives", async () => {
  const page = await openDesk();
  await page.context().route("**/scanner/*.wasm", (route) => route.abort());
  await startCamera(page);
  await expect(camera(page)).toHaveAttribute("data-engine", "html5-qrcode", { timeout: 30_000 });
  await expect(codeField(page)).toHaveValue(shown(code), { timeout: 20_000 });
  await page.context().close();
});

test("reads a photo of a tag where there is no camera, and says what is wrong with others", async ({
  page,
}) => {
  await desk.open(page);
  await startCamera(page);
  await expect(page.getByText("No camera", { exact: true })).toBeVisible();
  const photo = async (text: string | null): Promise<Buffer> => {
    const { width, height, pixels } = drawnTag(text ?? "-", 20);
    const raw = { width, height, channels: 1 as const };
    const tag = text === null ? Buffer.alloc(pixels.length, 200) : pixels;
    return sharp(tag, { raw })
      .rotate(17, { background: "#777" })
      .resize(1600)
      .extend({ top: 300, bottom: 900, left: 400, right: 900, background: "#777" })
      .jpeg({ quality: 60 })
      .toBuffer();
  };
  const input = page.locator('input[type="file"][aria-label="Photo of a tag"]');
  const give = (name: string, mimeType: string, buffer: Buffer) =>
    input.setInputFiles({ name, mimeType, buffer });
  await give("notes.jpg", "image/jpeg", Buffer.from("no picture"));
  await expect(page.getByText("That file is no picture that this browser can open.")).toBeVisible();
  await give("table.jpg", "image/jpeg", await photo(null));
  await expect(page.getByText("No tag could be read in that picture.")).toBeVisible({
    timeout: 60_000,
  });
  await give("tag.jpg", "image/jpeg", await photo(tagAddress(SHED, code)));
  await expect(codeField(page)).toHaveValue(shown(code), { timeout: 60_000 });
  await expect(page.getByText("No tag could be read in that picture.")).toBeHidden();
});

test("takes a hand scanner's burst wherever the focus is, and leaves slow typing alone", async ({
  page,
}) => {
  await desk.open(page);
  const cdp = await page.context().newCDPSession(page);
  /** All keys under way at once, as fast as a device sends them. */
  const scan = async (what: string) => {
    const keys = Array.from(tagAddress(SHED, what as LabelCode), (key) => ({ key, text: key }));
    await Promise.all(
      [...keys, { key: "Enter", text: "\r" }].flatMap((key) => [
        cdp.send("Input.dispatchKeyEvent", { type: "keyDown", ...key }),
        cdp.send("Input.dispatchKeyEvent", { type: "keyUp", key: key.key }),
      ]),
    );
  };
  await page.locator("body").click({ position: { x: 2, y: 2 } });
  await page.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
  await scan(code);
  await expect(codeField(page)).toHaveValue(shown(code));
  await expect(gross(page)).toBeFocused();

  // On a list, whose entries jump to what is typed; on a button, which Enter would press.
  const container = page.getByLabel("Container");
  await container.selectOption({ index: 1 });
  const chosen = await container.inputValue();
  const second = desk.nextCode();
  await container.focus();
  await scan(second);
  await expect(codeField(page)).toHaveValue(shown(second));
  await expect(container).toHaveValue(chosen);
  await page.getByRole("button", { name: /^Save/ }).focus();
  await scan(code);
  await expect(codeField(page)).toHaveValue(shown(code));

  await page.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
  await page.keyboard.type(second, { delay: 90 });
  await page.keyboard.press("Enter");
  await expect(codeField(page)).toHaveValue(shown(code));
});
