/**
 * The whole job: a coordinator orders and prints tags; a printed tag is filmed by the fake camera; a volunteer
 * scans, weighs and saves on a phone; stock changes; the downloaded CSV agrees with the ledger to the gram.
 */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { chromium, expect, test, type Browser, type Page } from "@playwright/test";
import Papa from "papaparse";
import { SHEETS } from "@/lib/bags/rules/tag-sheet";
import { formatCode } from "@/lib/core/bag-code";
import { installedBrowser } from "../support/browser.mjs";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { writeFilm } from "../support/film";
import { cut, missingPrintTool, renderPages } from "../support/scan-sheets";

const DPI = 150;
const PHONE = { viewport: { width: 360, height: 740 }, locale: "en-GB", timezoneId: "UTC" };

let server: E2eServer;
let folder: string;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-job-"));
});
test.afterAll(async () => {
  fs.rmSync(folder, { recursive: true, force: true });
  await server.close();
});

/** Orders three tags for the point and prints them. @returns the first code and its label's picture */
async function printTags(page: Page): Promise<{ code: string; film: string }> {
  await page.goto(`${server.url}/tags`);
  await expect(page.getByLabel("How many")).toHaveValue("21");
  await expectAccessible(page);
  await page.getByLabel("How many").fill("3");
  await page.getByLabel("For which point").selectOption({ label: "Harbour Road Library" });
  await page.getByRole("button", { name: "Order and print" }).click();
  await expect(page).toHaveURL(/\/tags\/[0-9a-f-]{36}\/print$/);
  await expectAccessible(page);
  const order = new URL(page.url()).pathname.split("/")[2] ?? "";
  const [first] = server.query<{ code: string; point: string }>(
    `select b.code, p.name as point from bags b join points p on p.id = b.point_id
     where b.order_id = ? order by b.code limit 1`,
    order,
  );
  expect(first?.point).toBe("Harbour Road Library");
  await page.goto(`${server.url}/tags/${order}/print?sheet=a4-21`);
  await expect(page.getByRole("img", { name: /^Sheet 1 of/ })).toBeVisible();
  await page.evaluate(() => document.fonts.ready);
  const pdf = path.join(folder, "tags.pdf");
  await page.pdf({ path: pdf, preferCSSPageSize: true, printBackground: true });
  const [sheet] = renderPages(pdf, DPI);
  if (!first || !sheet) throw new Error("nothing was printed");
  const { leftMm, topMm, label } = SHEETS["a4-21"];
  const film = path.join(folder, "tag.y4m");
  writeFilm(film, cut(sheet, { leftMm, topMm, ...label }, DPI));
  return { code: first.code, film };
}

function openCamera(film: string): Promise<Browser> {
  return chromium.launch({
    executablePath: installedBrowser() ?? undefined,
    args: [
      "--no-sandbox",
      "--use-fake-device-for-media-stream",
      "--use-fake-ui-for-media-stream",
      `--use-file-for-fake-video-capture=${film}`,
    ],
  });
}

test("one bag from its printed tag to the CSV", async ({ page }) => {
  const missing = missingPrintTool();
  test.skip(missing !== null, `${missing ?? ""} is not installed`);
  test.setTimeout(240_000);
  await server.signIn(page.context(), "coordinator");
  const { code, film } = await printTags(page);

  const phone = await openCamera(film);
  try {
    const context = await phone.newContext({ ...PHONE, permissions: ["camera"] });
    await server.signIn(context, "volunteer");
    const desk = await context.newPage();
    await desk.goto(`${server.url}/weigh-in`);
    await desk.getByRole("button", { name: "Scan with the camera" }).click();
    await expect(desk.getByLabel("Bag", { exact: true })).toHaveValue(formatCode(code), {
      timeout: 30_000,
    });
    await expect(desk.getByText("Harbour Road Library").first()).toBeVisible();
    await desk.getByLabel("On the scale").fill("3.360");
    await desk.getByLabel("Container").selectOption({ index: 1 });
    await desk.getByRole("radio", { name: "HDPE" }).check();
    await desk.getByRole("radio", { name: "Blue", exact: true }).check();
    await desk.getByLabel("The whole bag is one kind").check();
    await desk.getByRole("radio", { name: "Lids" }).check();
    await expectAccessible(desk);
    await desk.getByRole("button", { name: "Save 2.160 kg, next bag" }).click();
    await expect(desk.getByText(/It is in lot 1, which now holds 2\.160 kg/)).toBeVisible();
    // Ready for the next bag, with the camera still running.
    await expect(desk.getByRole("button", { name: "Stop the camera" })).toBeVisible();
    await desk.goto(`${server.url}/stock`);
    await expect(desk.getByText("2.16").first()).toBeVisible();
    await expectAccessible(desk);
    await desk.goto(`${server.url}/b/${code}`);
    await expect(desk.getByText(formatCode(code)).first()).toBeVisible();
    await expectAccessible(desk);
  } finally {
    await phone.close();
  }

  await page.setViewportSize(PHONE.viewport);
  await page.goto(`${server.url}/reports?by=polymer,colour`);
  await expectAccessible(page);
  const download = page.waitForEvent("download");
  await page.getByRole("link", { name: "Export CSV" }).click();
  const file = await (await download).path();
  const csv = Papa.parse<Record<string, string>>(fs.readFileSync(file, "utf8"), {
    header: true,
    skipEmptyLines: true,
  });
  expect(csv.errors).toEqual([]);
  const sum = (column: string): number =>
    csv.data.reduce((total, row) => total + Number(row[column]), 0);
  const [ledger] = server.query<{ collected: number; held: number }>(
    `select -sum(case when account = 'source' then grams else 0 end) as collected,
       sum(case when account in ('bag', 'lot', 'run', 'reject-bin') then grams else 0 end) as held from lines`,
  );
  expect(ledger).toEqual({ collected: 2160, held: 2160 });
  expect(sum("collected_g")).toBe(2160);
  expect(sum("accepted_g")).toBe(2160);
  expect(sum("closing_g")).toBe(2160);
  expect(csv.data.find((row) => row.colour === "blue" || row.colour === "Blue")?.closing_g).toBe(
    "2160",
  );
});
