/** One bag sorted on the built program, at 360 px: piles, a reject, what is missing, a reload, and undo. */
import { expect, test } from "@playwright/test";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { addPile, save, sortingShed } from "../support/sorting-page";

let server: E2eServer;
let shed: ReturnType<typeof sortingShed>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  shed = sortingShed(server);
});
test.afterAll(async () => {
  await server.close();
});

test("splits a bag into piles and a reject, keeps them through a reload, and takes it back", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const code = await shed.weighedBag(page, 2160);
  await page.goto(`${server.url}/sorting`);
  await expect(page.getByText("1 bag waits")).toBeVisible();
  await expectAccessible(page);
  await page.getByLabel("Code on the tag").fill(code.toLowerCase());
  await page.keyboard.press("Enter");
  await expect(page.getByText("of 2.160 kg")).toBeVisible();
  await expect(page).toHaveURL(/\/sorting\/table\//);

  await addPile(page, "Blue", "1.295");
  await expect(page.getByText("whole, new lot")).toBeVisible();
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
  await expect(page).toHaveURL(/\/sorting\/sessions\//);
  await expectAccessible(page);
  expect(shed.lotSums()).toEqual([{ grams: 1295 }, { grams: 520 }, { grams: 230 }]);
  expect(
    server.query("select account, grams from lines where holder_id is null order by entry_id"),
  ).toEqual([
    { account: "source", grams: -2160 },
    { account: "difference", grams: 10 },
  ]);
  // The tag of a sorted bag leads to how it was sorted.
  await page.goto(`${server.url}/sorting/${code}`);
  await expect(page.getByText("Sorted by")).toBeVisible();

  await page.getByRole("button", { name: "Undo this sorting" }).click();
  await expect(page.getByText("Its bags wait again.")).toBeVisible();
  expect(shed.lotSums()).toEqual([{ grams: 0 }, { grams: 0 }, { grams: 0 }]);
  await page.getByRole("button", { name: "Sort again, with these weights" }).click();
  await expect(page.getByText("10 g left over, within what the scale can tell.")).toBeVisible();
});

test("asks once where more is missing than the scale can explain, and weighs again", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const code = await shed.weighedBag(page, 2000);
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
  const code = await shed.weighedBag(page, 1000);
  await page.goto(`${server.url}/sorting/${code}`);
  await addPile(page, "Green", "1");
  await server.stop();
  await save(page).click();
  await expect(page.getByRole("alert").getByText("The server did not answer")).toBeVisible();
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
  await page.goto(`${server.url}/sorting/${shed.unused()}`);
  await expect(page.getByText("This bag has not been weighed in yet.")).toBeVisible();
  await page.goto(`${server.url}/sorting`);
  await page.getByLabel("Code on the tag").fill("K7Q2-9F4N");
  await page.getByRole("button", { name: "Sort it" }).click();
  await expect(page.getByText("One letter or figure is wrong")).toBeVisible();
});
