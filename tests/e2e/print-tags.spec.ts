/** Tags from the order to paper: ordered on the page, printed by Chromium, read by a scanner. */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { expect, test, type Page } from "@playwright/test";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";
import { SHEETS, sheetPages, tagDrawing, type SheetId } from "@/lib/bags/rules/tag-sheet";
import { tagAddress, type LabelCode } from "@/lib/core/bag-code";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import {
  cut,
  darkBox,
  missingPrintTool,
  pageSizes,
  readSymbols,
  renderPages,
} from "../support/scan-sheets";

/** More than a sheet of any kind holds. */
const TAGS = 25;

let server: E2eServer;
let folder: string;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-sheets-"));
});
test.afterAll(async () => {
  fs.rmSync(folder, { recursive: true, force: true });
  await server.close();
});
test.beforeEach(async ({ context }) => {
  await server.signIn(context, "coordinator");
});

async function orderTags(page: Page): Promise<{ order: string; codes: LabelCode[] }> {
  await page.goto(`${server.url}/tags`);
  // The form fills in its own number once it is alive; what is typed before that would be lost.
  await expect(page.getByLabel("How many")).toHaveValue("21");
  await page.getByLabel("How many").fill(String(TAGS));
  await page.getByRole("button", { name: "Order and print" }).click();
  await expect(page).toHaveURL(/\/tags\/[0-9a-f-]{36}\/print$/);
  const order = new URL(page.url()).pathname.split("/")[2] ?? "";
  const codes = server
    .query<{ code: LabelCode }>("select code from bags where order_id = ? order by code", order)
    .map((row) => row.code);
  expect(codes).toHaveLength(TAGS);
  return { order, codes };
}

async function print(page: Page, address: string, name: string): Promise<string> {
  await page.goto(`${server.url}${address}`);
  await expect(page.getByRole("img", { name: /^Sheet 1 of|^Calibration sheet/ })).toBeVisible();
  await page.evaluate(() => document.fonts.ready);
  const file = path.join(folder, `${name}.pdf`);
  await page.pdf({ path: file, preferCSSPageSize: true, printBackground: true });
  return file;
}

const SHEETS_TO_PRINT: readonly { sheet: SheetId; start: number; pages: number }[] = [
  { sheet: "a4-21", start: 1, pages: 2 },
  { sheet: "a4-21", start: 18, pages: 2 },
  { sheet: "letter-10", start: 1, pages: 3 },
  { sheet: "letter-18", start: 1, pages: 2 },
];

test("every tag of an order is printed where it belongs and can be read", async ({ page }) => {
  const missing = missingPrintTool();
  test.skip(missing !== null, `${missing ?? ""} is not installed`);
  test.setTimeout(240_000);
  const { order, codes } = await orderTags(page);
  const expected = codes.map((code) => tagAddress(server.url, code));
  const symbol = qrSymbol(expected[0] ?? "");
  expect(symbol.alphanumeric).toBe(true);
  const qr = qrSize(symbol.modules);

  for (const { sheet: id, start, pages } of SHEETS_TO_PRINT) {
    const sheet = SHEETS[id];
    const drawing = tagDrawing(sheet, qr);
    if (!drawing) throw new Error("the symbol does not fit");
    const pdf = await print(
      page,
      `/tags/${order}/print?sheet=${id}&start=${start}`,
      `${id}-${start}`,
    );

    await test.step(`${id} from label ${start}: paper`, () => {
      const sizes = pageSizes(pdf);
      expect(sizes, "no sheet too many, and no empty one at the end").toHaveLength(pages);
      for (const { widthMm, heightMm } of sizes) {
        expect(Math.abs(widthMm - sheet.paper.widthMm)).toBeLessThan(0.5);
        expect(Math.abs(heightMm - sheet.paper.heightMm)).toBeLessThan(0.5);
      }
    });

    for (const dpi of [300, 150]) {
      await test.step(`${id} from label ${start}: ${dpi} dpi`, () => {
        const rendered = renderPages(pdf, dpi);
        const labels = sheetPages(sheet, TAGS, start).flatMap((places, at) =>
          places.map((place) => {
            const paper = rendered[at];
            if (!paper) throw new Error("a sheet is missing");
            return cut(paper, { ...place, ...sheet.label }, dpi);
          }),
        );
        expect(readSymbols(labels, folder)).toEqual(expected);
        const [first] = labels;
        if (!first) throw new Error("no label");
        const beside = { leftMm: 0, topMm: 0, heightMm: sheet.label.heightMm };
        const dark = darkBox(
          cut(first, { ...beside, widthMm: drawing.textLeftMm - 0.4 }, dpi),
          dpi,
        );
        const pixel = 25.4 / dpi;
        expect(dark?.widthMm).toBeGreaterThanOrEqual(30 - pixel);
        expect(dark?.heightMm).toBeGreaterThanOrEqual(30 - pixel);
        expect((dark?.widthMm ?? 0) / symbol.modules).toBeGreaterThanOrEqual(0.8);
        expect(dark?.leftMm, "quiet zone of four modules").toBeGreaterThanOrEqual(
          4 * qr.moduleMm - pixel,
        );
        expect(dark?.topMm).toBeGreaterThanOrEqual(4 * qr.moduleMm - pixel);
      });
    }
  }
});

test("offsets move everything, and the calibration sheet shows them", async ({ page }) => {
  const missing = missingPrintTool();
  test.skip(missing !== null, `${missing ?? ""} is not installed`);
  const { order } = await orderTags(page);
  const dpi = 150;
  const symbolAt = async (query: string, name: string) => {
    const pdf = await print(page, `/tags/${order}/print?sheet=letter-10${query}`, name);
    const [first] = renderPages(pdf, dpi);
    if (!first) throw new Error("no sheet");
    // The first label as far as its text begins.
    const label = { leftMm: 0, topMm: 0, widthMm: 46, heightMm: 62 };
    return darkBox(cut(first, label, dpi), dpi);
  };
  const plain = await symbolAt("", "plain");
  const moved = await symbolAt("&x=2.5&y=-1.5", "moved");
  expect((moved?.leftMm ?? 0) - (plain?.leftMm ?? 0)).toBeCloseTo(2.5, 0);
  expect((moved?.topMm ?? 0) - (plain?.topMm ?? 0)).toBeCloseTo(-1.5, 0);

  const pdf = await print(page, "/tags/calibration?sheet=a4-21&x=2&y=0", "calibration");
  expect(pageSizes(pdf)).toHaveLength(1);
  const [sheet] = renderPages(pdf, 300);
  if (!sheet) throw new Error("no sheet");
  // Inside the large cross, left of its middle: the upright arm stands at 30 mm, moved by two.
  const arm = darkBox(cut(sheet, { leftMm: 26, topMm: 24, widthMm: 12, heightMm: 2 }, 300), 300);
  expect(26 + (arm?.leftMm ?? 0) + (arm?.widthMm ?? 0) / 2).toBeCloseTo(32, 0);
});

test("what a browser keeps: the sheet and its offsets, for each sheet its own", async ({
  page,
}) => {
  const { order } = await orderTags(page);
  await page.getByLabel("Sheet", { exact: true }).selectOption("letter-18");
  await page.getByLabel("Move right").fill("-1,5");
  await page.goto(`${server.url}/tags/${order}/print`);
  await expect(page.getByLabel("Sheet", { exact: true })).toHaveValue("letter-18");
  await expect(page.getByLabel("Move right")).toHaveValue("-1,5");
  await page.getByLabel("Sheet", { exact: true }).selectOption("a4-21");
  await expect(page.getByLabel("Move right")).toHaveValue("0");
  await page.getByLabel("Move right").fill("far");
  await expect(page.getByText("Type millimetres between")).toBeVisible();
  await page.getByLabel("First free label").fill("22");
  await expect(page.getByText("Type a number from 1 to 21.")).toBeVisible();
  await page.getByLabel("First free label").fill("21");
  await expect(page.getByRole("button", { name: `Print ${TAGS} tags on 3 sheets` })).toBeVisible();
});
