/** From "we want ten sheets" to reserved lots: planned, found short, the blend changed, reserved, printed, raced for. */
import { expect, test, type Page } from "@playwright/test";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { sortingShed } from "../support/sorting-page";

let server: E2eServer;
let shed: ReturnType<typeof sortingShed>;

/** A sheet of 143.3 g that takes 150.4 g with its trim (issue's own example), and a press for it. */
const SHEET = {
  name: "Test sheet",
  method: "pressing",
  polymers: ["PE-HD"],
  kinds: ["lids"],
  lengthUm: "200",
  widthUm: "25 cm",
  thicknessUm: "3",
  trimThousandths: "5",
  piecesPerSheet: "",
  volumeMm3: "",
  massMilligrams: "",
  priceCents: "12.50",
  otherCostCents: "1",
  mostHeatedThousandths: "",
};
const PRESS = {
  name: "Test press",
  method: "pressing",
  plateLengthUm: "600",
  plateWidthUm: "600",
  barrelMm3: "",
  usableThousandths: "",
  leastShotMilligrams: "",
  purgeMilligrams: "",
  meltSeconds: 1800,
  cycleSeconds: 600,
  ratedWatts: "",
  setPoints: [{ polymer: "PE-HD", celsius: 190 }],
};

test.beforeAll(async ({ browser }) => {
  server = await startE2eServer("shed");
  shed = sortingShed(server);
  const context = await browser.newContext();
  const page = await context.newPage();
  await server.signIn(context, "lead");
  await shed.post(page, "/api/pieces", SHEET);
  await shed.post(page, "/api/machines", PRESS);
  for (const [colourCode, grams] of [
    ["blue", 2000],
    ["white", 300],
  ] as const) {
    await shed.weighedBag(page, grams, {
      polymer: "PE-HD",
      kind: "lids",
      colourCode,
      oneKind: true,
    });
  }
  await context.close();
});
test.afterAll(async () => {
  await server.close();
});

async function chooseColours(page: Page, ...colours: string[]): Promise<void> {
  for (const colour of colours) {
    await page.getByLabel(/^(First|Another) colour$/).selectOption(colour);
  }
}

test("ten sheets are planned, found short, changed, reserved and printed", async ({ page }) => {
  test.setTimeout(120_000);
  await server.signIn(page.context(), "lead");
  await page.goto(`${server.url}/runs`);
  await expectAccessible(page);
  await page.getByRole("link", { name: "Plan a run" }).first().click();
  await expect(page.getByRole("heading", { name: "Plan a run" })).toBeVisible();
  await page.getByLabel("Sheets").fill("10");
  await expect(
    page.getByText("150 cm³ × 0.955 g/cm³ = 143.3 g, with 5 % trim 150.4 g"),
  ).toBeVisible();
  await chooseColours(page, "blue", "white");
  await expect(page.getByText("short 0.452")).toBeVisible();
  await expect(page.getByText(/Enough for\s*3\s*sheets now/)).toBeVisible();
  await expect(page.getByText("White: too little history to say when")).toBeVisible();
  await expectAccessible(page);

  await page.getByLabel("Share of white in per cent").fill("15");
  await expect(page.getByLabel("Share of blue in per cent")).toHaveValue("85");
  await expect(page.getByText("Enough for all of it")).toBeVisible();
  await page.getByRole("button", { name: "Keep this plan, 1.505 kg" }).click();

  await expect(page.getByRole("heading", { name: "10 × test sheet, pressed" })).toBeVisible();
  await page.getByRole("button", { name: "Reserve 1.505 kg, oldest lots first" }).click();
  await expect(page.getByText("1.505 kg reserved")).toBeVisible();
  await expect(page.getByRole("link", { name: "Lot 1" })).toBeVisible();
  await expectAccessible(page);
  expect(server.query("select sum(grams) as grams from reservations where state = 'held'")).toEqual(
    [{ grams: 1505 }],
  );

  await page.getByRole("link", { name: "Run sheet" }).click();
  await expect(page.getByRole("img", { name: /QR symbol of run/ })).toBeVisible();
  await expect(
    page.getByText("HDPE: set 190 °C on this machine, never above 274 °C."),
  ).toBeVisible();
  await expectAccessible(page);
  await page.goto(`${server.url}/stock`);
  await expect(
    page.getByText("HDPE, Blue: 2.000 kg, 1.279 kg of it reserved").first(),
  ).toBeAttached();
});

test("of two leads who race for the last blue one gets it, and the other is told", async ({
  page,
  browser,
}) => {
  test.setTimeout(120_000);
  const other = await (await browser.newContext()).newPage();
  const plans: Page[] = [page, other];
  for (const one of plans) {
    await server.signIn(one.context(), "lead");
    await one.goto(`${server.url}/runs/new`);
    await one.getByLabel("Sheets").fill("4");
    await chooseColours(one, "blue");
    await one.getByRole("button", { name: /^Keep this plan/ }).click();
    await expect(one.getByRole("heading", { name: "4 × test sheet, pressed" })).toBeVisible();
  }
  // 721 g of blue are free, each wants 602 g.
  await Promise.all(
    plans.map((one) => one.getByRole("button", { name: /oldest lots first/ }).click()),
  );
  for (const one of plans) await expect(one.getByText(/kg reserved$/)).toBeVisible();
  const held = server.query<{ grams: number }>(
    `select sum(v.grams) as grams from reservations v join lots l on l.id = v.lot_id
      where v.state = 'held' and l.number = 1`,
  );
  expect(held).toEqual([{ grams: 2000 }]);
  const told = await Promise.all(
    plans.map((one) => one.getByText("Nothing more was free: blue lacks 0.483 kg.").count()),
  );
  expect(told.reduce((sum, count) => sum + count, 0)).toBe(1);

  // By hand there is nothing left to take.
  const short = told[0] === 1 ? page : other;
  await short.getByText("Choose lots by hand").click();
  await expect(short.getByText("No lot of these colours has anything free.")).toBeVisible();

  // A plan that is given up frees its blue for whoever asks next.
  const lucky = short === page ? other : page;
  await lucky.getByRole("button", { name: "Call it off" }).click();
  await lucky.getByRole("alertdialog").getByRole("button", { name: "Call it off" }).click();
  await expect(lucky.getByText(/called off/)).toBeVisible();
  await short.reload();
  await short.getByRole("button", { name: "Reserve 0.483 kg, oldest lots first" }).click();
  await expect(short.getByText("0.483 kg reserved")).toBeVisible();
  await other.context().close();
});

test("a count that leaves too little turns the newest promise short", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  const [lot] = server.query<{ id: string; grams: number }>(
    `select l.id, b.grams from lots l join balances b on b.holder_id = l.holder_id where l.number = 2`,
  );
  expect(lot?.grams).toBe(300);
  const [run] = server.query<{ number: number }>("select min(number) as number from runs");
  await shed.post(page, "/api/lots/2/counts", {
    occurredAt: Date.now(),
    counted: { found: "empty" },
    seen: { entryId: 0, countId: null },
    confirmed: true,
  });
  await page.goto(`${server.url}/runs/${run?.number ?? 0}`);
  await expect(page.getByText(/^Short by 0\.226 kg$/)).toBeVisible();
  await expectAccessible(page);
});
