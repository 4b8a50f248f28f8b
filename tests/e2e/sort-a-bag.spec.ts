/** One bag sorted on the built program, at 360 px: piles, a reject, what is missing, a reload, and undo. */
import AxeBuilder from "@axe-core/playwright";
import { expect, test, type Page } from "@playwright/test";
import { newId } from "@/lib/core/ids";
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

/** Weighs a bag in over HTTP, as the weigh-in page does. */
async function weighedBag(page: Page, grams: number): Promise<string> {
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
  return code;
}

async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}

async function addPile(page: Page, colour: string, kg: string): Promise<void> {
  await page.getByRole("button", { name: "Add pile" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("radio", { name: "HDPE" }).check();
  await dialog.getByRole("radio", { name: colour, exact: true }).check();
  await dialog.getByLabel("Kind").selectOption("lids");
  await dialog.getByLabel("The scale shows").fill(kg);
  await dialog.getByRole("button", { name: /^Put/ }).click();
  await expect(dialog).toBeHidden();
}

const save = (page: Page) => page.getByRole("button", { name: /^Save \d+ weights?, close bag$/ });
const lotSums = () =>
  server.query<{ grams: number }>(
    "select b.grams from balances b join lots l on l.holder_id = b.holder_id order by l.number",
  );

test("splits a bag into piles and a reject, keeps them through a reload, and takes it back", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const code = await weighedBag(page, 2160);
  await page.goto(`${server.url}/sorting`);
  await expect(page.getByText("1 bag waits")).toBeVisible();
  await expectAccessible(page);
  await page.getByLabel("Code on the tag").fill(code.toLowerCase());
  await page.keyboard.press("Enter");
  await expect(page.getByText("of 2.160 kg")).toBeVisible();

  await addPile(page, "Blue", "1.295");
  await addPile(page, "Light blue", "0.52");
  await addPile(page, "White", "0.23");
  await expect(page.getByText("0.115 kg still to weigh.")).toBeVisible();
  await page.getByRole("button", { name: "Add reject" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("radio", { name: "Sharps or battery" }).check();
  await expect(dialog.getByText("Stop, gloves, set aside")).toBeVisible();
  await dialog.getByRole("radio", { name: "Stuck-together materials" }).check();
  await expect(dialog.getByText("Stop, gloves, set aside")).toBeHidden();
  await expectAccessible(page);
  await dialog.getByLabel("The scale shows").fill("0.105");
  await dialog.getByRole("button", { name: /^Turn/ }).click();
  await expect(page.getByText("10 g left over, within what the scale can tell.")).toBeVisible();
  await expectAccessible(page);

  await page.reload();
  await expect(page.getByText("10 g left over, within what the scale can tell.")).toBeVisible();
  await expect(save(page)).toHaveText("Save 4 weights, close bag");
  await save(page).click();
  await expect(page.getByText("Sorted by")).toBeVisible();
  await expect(page.getByText("Weighing difference, missing")).toBeVisible();
  await expectAccessible(page);
  expect(lotSums()).toEqual([{ grams: 1295 }, { grams: 520 }, { grams: 230 }]);
  expect(
    server.query("select account, grams from lines where holder_id is null order by entry_id"),
  ).toEqual([
    { account: "source", grams: -2160 },
    { account: "difference", grams: 10 },
  ]);

  await page.getByRole("button", { name: "Undo this sorting" }).click();
  await expect(page.getByText("Weigh the first pile.")).toBeVisible();
  expect(lotSums()).toEqual([{ grams: 0 }, { grams: 0 }, { grams: 0 }]);
});

test("asks once where more is missing than the scale can explain", async ({ page }) => {
  await server.signIn(page.context(), "volunteer");
  const code = await weighedBag(page, 2000);
  await page.goto(`${server.url}/sorting/${code}`);
  await addPile(page, "Red", "1.8");
  await save(page).click();
  const asked = page.getByRole("alertdialog");
  await expect(asked.getByText("0.200 kg is missing")).toBeVisible();
  await expectAccessible(page);
  await asked.getByRole("button", { name: "Weigh again" }).click();
  await expect(page.getByText("0.200 kg still to weigh.")).toBeVisible();
  await save(page).click();
  await asked.getByRole("radio", { name: "Liquid and residue" }).check();
  await asked.getByRole("button", { name: "Save, 0.200 kg lost" }).click();
  await expect(page.getByText("Liquid and residue, lost")).toBeVisible();
  expect(
    server.query(
      "select account, cause, grams from lines where account in ('loss', 'difference') order by entry_id desc limit 1",
    ),
  ).toEqual([{ account: "loss", cause: "liquid", grams: 200 }]);
});

test("keeps the piles when the server is gone, and saves them when it is back", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const code = await weighedBag(page, 1000);
  await page.goto(`${server.url}/sorting/${code}`);
  await addPile(page, "Green", "1");
  await server.stop();
  await save(page).click();
  await expect(page.getByText("The server did not answer", { exact: true })).toBeVisible();
  await server.start();
  await save(page).click();
  await expect(page.getByText("Sorted by")).toBeVisible();
  expect(
    server.query(
      "select count(*) as sortings from sorting_bags s join bags b on b.id = s.bag_id where b.code = ?",
      code,
    ),
  ).toEqual([{ sortings: 1 }]);
});

test("says of a bag that is not weighed, or no bag at all, what it is", async ({ page }) => {
  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/sorting/${codes[0] ?? ""}`);
  await expect(page.getByText("This bag has not been weighed in yet.")).toBeVisible();
  await page.goto(`${server.url}/sorting`);
  await page.getByLabel("Code on the tag").fill("K7Q2-9F4N");
  await page.getByRole("button", { name: "Sort it" }).click();
  await expect(page.getByText("One letter or figure is wrong")).toBeVisible();
});
