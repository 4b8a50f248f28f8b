/** What the shelf and the report show of a demo's eight months, and that the downloaded files say what the ledger says. */
import fs from "node:fs";
import { expect, test, type Page } from "@playwright/test";
import Papa from "papaparse";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("demo");
});
test.afterAll(async () => {
  await server.close();
});

const grams = (sql: string): number => server.query<{ grams: number }>(sql)[0]?.grams ?? 0;
/** As the pages write it, but for the thin space of thousands: halves go up, which toFixed does not promise. */
const kg = (value: number, places: 2 | 3): string =>
  places === 3 ? (value / 1000).toFixed(3) : (Math.floor((value + 5) / 10) / 100).toFixed(2);
const plain = (text: string): string => text.replaceAll("\u2009", "");

type Row = Record<string, string>;

async function download(page: Page, name: string): Promise<Row[]> {
  const [file] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name }).click(),
  ]);
  expect(file.suggestedFilename()).toMatch(
    /^bismar-(balance|movements)-\d{4}-\d\d-\d\d-\d{4}-\d\d-\d\d\.csv$/,
  );
  const text = fs.readFileSync(await file.path(), "utf8");
  expect(text.endsWith("\r\n")).toBe(true);
  return Papa.parse<Row>(text.trimEnd(), { header: true }).data;
}

const total = (rows: readonly Row[], column: string): number =>
  rows.reduce((sum, row) => sum + Number(row[column]), 0);

test("shows the shelf, a cell's lots and a lot's movements", async ({ page }) => {
  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/stock`);
  const shelf = grams(
    "select sum(b.grams) as grams from balances b join lots l on l.holder_id = b.holder_id",
  );
  await expect
    .poll(async () => plain(await page.getByRole("main").innerText()))
    .toContain(kg(shelf, 2));
  await expectAccessible(page);

  await page
    .getByRole("link", { name: /^HDPE, Blue:/ })
    .filter({ visible: true })
    .click();
  await expect(page.getByRole("heading", { name: "Lots: Blue HDPE" })).toBeVisible();
  await expectAccessible(page);
  await page
    .getByRole("link", { name: /^Lot \d+$/ })
    .first()
    .click();
  await expect(page.getByRole("heading", { name: "Every movement" })).toBeVisible();
  await expectAccessible(page);
  await page.getByLabel("Place", { exact: true }).fill("Rack B, shelf 2");
  await page.getByRole("button", { name: "Save place" }).click();
  await expect(page.getByRole("button", { name: "Saved" })).toBeVisible();
  await page.reload();
  await expect(page.getByLabel("Place", { exact: true })).toHaveValue("Rack B, shelf 2");
});

test("keeps the stock fresh by itself, and its filter through a reload", async ({ page }) => {
  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/stock`);
  await page.getByLabel("Form").selectOption("sheet");
  await expect(page.getByText("Nothing of this on the shelf")).toBeVisible();
  await page.reload();
  await expect(page.getByLabel("Form")).toHaveValue("sheet");
  const asked = page.waitForRequest(/\/api\/stock\?form=sheet$/, { timeout: 40_000 });
  await asked;
});

test("the files say what the ledger says, to the gram", async ({ page }) => {
  await server.signIn(page.context(), "coordinator");
  const [first] = server.query<{ day: string }>("select min(booked_day) as day from entries");
  const [last] = server.query<{ day: string }>("select max(booked_day) as day from entries");
  await page.goto(`${server.url}/reports?from=${first?.day}&to=${last?.day}&by=month&by=polymer`);
  const collected = grams("select -sum(grams) as grams from lines where account = 'source'");
  await expect
    .poll(async () => plain(await page.getByRole("main").innerText()))
    .toContain(kg(collected, 3));
  await expectAccessible(page);

  const rows = await download(page, "Export CSV");
  expect(total(rows, "collected_g")).toBe(collected);
  expect(total(rows, "resorted_g")).toBe(0);
  expect(total(rows, "difference_g")).toBe(
    grams("select coalesce(sum(grams), 0) as grams from lines where account = 'difference'"),
  );
  for (const row of rows) {
    const cell = (name: string): number => Number(row[`${name}_g`]);
    expect(
      cell("opening") +
        cell("collected") +
        cell("other_in") +
        cell("opening_count") +
        cell("resorted") -
        cell("disposed") -
        cell("passed_on_proven") -
        cell("passed_on_unproven") -
        cell("loss") -
        cell("difference") -
        cell("pieces") -
        cell("before_opening"),
    ).toBe(cell("closing"));
  }
  const held =
    "select sum(grams) as grams from lines where account in ('bag', 'lot', 'run', 'reject-bin')";
  const lastMonth = rows.at(-1)?.month;
  expect(
    total(
      rows.filter((row) => row.month === lastMonth),
      "closing_g",
    ),
  ).toBe(grams(held));

  const movements = await download(page, "Every movement as CSV");
  expect(movements).toHaveLength(
    server.query<{ n: number }>("select count(*) as n from lines")[0]?.n ?? 0,
  );
  expect(total(movements, "grams")).toBe(0);
  expect(
    total(
      movements.filter((row) => row.account === "source"),
      "grams",
    ),
  ).toBe(-collected);
});

test("a report of days that nobody knows is empty, and of wrong days says so", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  await page.goto(`${server.url}/reports?from=2001-01-01&to=2001-01-31&by=point`);
  await expect(page.getByText("Nothing was sorted on these days.")).toBeVisible();
  await expect(page.getByRole("link", { name: "Export CSV" })).toHaveCount(0);
  await expectAccessible(page);
  await page.goto(`${server.url}/reports?from=2026-05-02&to=2026-05-01`);
  await expect(page.getByText("The last day must not be before the first.")).toBeVisible();
});
