/** A lot shredded on a phone, from its page to the flake; and a bin counted that the book calls empty. */
import { expect, test, type Page } from "@playwright/test";
import { newId } from "@/lib/core/ids";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

let server: E2eServer;
let codes: string[];

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  codes = server
    .query<{ code: string }>("select code from bags order by code")
    .map(({ code }) => code);
});
test.afterAll(async () => {
  await server.close();
});

/** Weighs a bag of one kind in over HTTP: it goes straight into its lot, whose number comes back. */
async function filledLot(page: Page, grams: number, colourCode: string): Promise<number> {
  const code = codes.pop();
  const [scale] = server.query<{ id: string }>("select id from scales order by number limit 1");
  if (!code || !scale) throw new Error("The scheme has no tag or no scale left for this test.");
  const answer = await page.request.post(`${server.url}/api/weigh-ins`, {
    headers: { origin: server.url },
    data: {
      requestId: newId(),
      code,
      scaleId: scale.id,
      occurredAt: Date.now(),
      polymer: "PE-HD",
      kind: "lids",
      colourCode,
      oneKind: true,
      readings: [
        {
          grossMilligrams: grams * 1000,
          containerId: null,
          containerTareMilligrams: 0,
          sackId: null,
          sackTareMilligrams: 0,
        },
      ],
    },
  });
  expect(answer.status(), await answer.text()).toBe(200);
  const receipt = (await answer.json()) as { lot: { number: number } };
  return receipt.lot.number;
}

const held = (number: number): number =>
  server.query<{ grams: number }>(
    "select coalesce(sum(b.grams), 0) as grams from balances b join lots l on l.holder_id = b.holder_id where l.number = ?",
    number,
  )[0]?.grams ?? 0;

test.use({ viewport: { width: 360, height: 740 } });

test("shreds a lot: all of it in, flake and dust out, and back again", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  const number = await filledLot(page, 3160, "blue");
  await page.goto(`${server.url}/stock/lots/${number}`);
  await expectAccessible(page);
  await page.getByRole("link", { name: "Wash, dry or shred" }).click();

  await page.getByRole("radio", { name: "Shredding" }).check();
  await expect(page.getByText("Switch off and lock out before clearing")).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("button", { name: "3.160 kg go in, next" }).click();

  await page.getByLabel("The scale shows").fill("3.1");
  await expect(page.getByText("of 3.160 kg")).toBeVisible();
  await expect(page.getByText("0.060 kg are missing")).toBeVisible();
  await page.reload();
  // What was typed is still on this device.
  await page.getByRole("button", { name: "3.160 kg go in, next" }).click();
  await expect(page.getByLabel("The scale shows")).toHaveValue("3.1");
  await page.getByLabel("The scale shows").fill("3.15");
  await page.getByRole("button", { name: "3.150 kg came out, next" }).click();
  await expectAccessible(page);
  await page.getByLabel("Dust and fume").fill("0.010");
  await expect(page.getByText("All of it is accounted for.")).toBeVisible();
  await page.getByLabel("How long did it take?").fill("45");
  await page.getByRole("button", { name: "Save shredding, 3.150 kg" }).click();

  await expect(page.getByRole("heading", { name: "Shredding HDPE" })).toBeVisible();
  await expectAccessible(page);
  const [flake] = server.query<{ number: number }>(
    "select l.number from step_outputs o join lots l on l.id = o.lot_id",
  );
  expect(held(number)).toBe(0);
  expect(held(flake?.number ?? 0)).toBe(3150);
  expect(server.query("select closed_for from lots where number = ?", number)).toEqual([
    { closed_for: "step" },
  ]);

  await page.getByRole("button", { name: "Undo this step" }).click();
  await expect(page.getByText("This step was undone.")).toBeVisible();
  expect(held(number)).toBe(3160);
  await page.goto(`${server.url}/steps`);
  await expect(page.getByText("no step yet").first()).toBeVisible();
  await expectAccessible(page);
});

test("counts a bin that the book calls empty; a lead looks at it and puts it right", async ({
  browser,
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const number = await filledLot(page, 800, "white");
  await page.goto(`${server.url}/stock/lots/${number}`);
  await page.getByRole("button", { name: "Bin is empty" }).click();
  await page.getByRole("button", { name: "Bin is empty, save" }).click();
  await expect(page.getByText("0.000 kg counted, 0.800 kg less than the book.")).toBeVisible();
  expect(held(number)).toBe(0);

  await page.getByRole("button", { name: "Count it" }).click();
  const dialog = page.getByRole("dialog");
  await expect(dialog.getByText("The book holds 0.000 kg")).toBeVisible();
  await dialog.getByLabel("The scale shows").fill("0.752");
  await expect(dialog.getByText("The scale shows steps of 5 g")).toBeVisible();
  await dialog.getByLabel("The scale shows").fill("0.75");
  await expectAccessible(page);
  await dialog.getByRole("button", { name: "Save 0.750 kg" }).click();
  await expect(page.getByText("0.750 kg counted, 0.750 kg more than the book.")).toBeVisible();
  expect(held(number)).toBe(750);

  const other = await browser.newContext({ viewport: { width: 1280, height: 800 } });
  await server.signIn(other, "lead");
  const desk = await other.newPage();
  await desk.goto(`${server.url}/counts`);
  await expectAccessible(desk);
  const counted = desk.getByRole("listitem").filter({ hasText: "Counted: 0.750 kg" });
  await counted.getByRole("button", { name: "Correct" }).click();
  const correcting = desk.getByRole("dialog");
  await correcting.getByLabel("The scale shows").fill("0.7");
  await correcting.getByLabel("Why is it corrected?").fill("A lid lay on the scale");
  await expectAccessible(desk);
  await correcting.getByRole("button", { name: "Correct it" }).click();
  await expect(desk.getByText("Nothing had been taken from it since.")).toBeVisible();
  expect(held(number)).toBe(700);
  // Once the list is fresh only the other count of this bin waits: that it is empty.
  const waits = desk.getByRole("button", { name: "Let it stand" });
  await expect(waits).toHaveCount(1);
  await waits.click();
  await expect(desk.getByText("No count waits")).toBeVisible();
  await other.close();
});

test("two people count one bin: the second is told, loses nothing, and may let it stand", async ({
  page,
  browser,
}) => {
  await server.signIn(page.context(), "volunteer");
  const number = await filledLot(page, 2000, "green");
  await page.goto(`${server.url}/stock/lots/${number}`);
  await page.getByRole("button", { name: "Count it" }).click();
  await page.getByLabel("The scale shows").fill("1.95");

  const other = await browser.newContext();
  await server.signIn(other, "lead");
  const lead = await other.newPage();
  await lead.goto(`${server.url}/stock/lots/${number}`);
  await lead.getByRole("button", { name: "Count it" }).click();
  await lead.getByLabel("The scale shows").fill("1.98");
  await lead.getByRole("button", { name: "Save 1.980 kg" }).click();
  await expect(lead.getByText("1.980 kg counted")).toBeVisible();
  await other.close();

  await page.getByRole("button", { name: "Save 1.950 kg" }).click();
  await expect(page.getByText(/Test lead counted lot \d+ meanwhile: 1\.980 kg/)).toBeVisible();
  await expect(page.getByLabel("The scale shows")).toHaveValue("1.95");
  await page.getByRole("button", { name: "Let mine stand" }).click();
  await expect(page.getByText("1.950 kg counted, 0.030 kg less than the book.")).toBeVisible();
  expect(held(number)).toBe(1950);
});
