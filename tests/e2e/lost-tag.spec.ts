/** A bag whose tag is lost, and a picture that went wrong: what a volunteer mends alone, at 360 px. */
import { expect, test, type Page } from "@playwright/test";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { phonePicture, photosOf } from "../support/photo-page";
import { weighInDesk } from "../support/weigh-in-page";

let server: E2eServer;
let desk: ReturnType<typeof weighInDesk>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  await server.storage.start();
  desk = weighInDesk(server);
});
test.afterAll(async () => {
  await server.close();
});

async function openDialog(page: Page, code: string): Promise<void> {
  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/bags/${code}`);
  await page.getByRole("button", { name: "Replace a lost tag" }).click();
}

const codesOf = (code: string) =>
  server.query<{ code: string }>(
    "select code from labels where subject = (select subject from labels where code = ?)",
    code,
  );

test("another tag goes on the bag, and both codes open it", async ({ page }) => {
  const [code, taken] = [desk.nextCode(), desk.nextCode()];
  await openDialog(page, code);
  const field = page.getByLabel("Code of the spare tag");
  // As a hand scanner types it, with the Enter at its end: nothing is sent by that.
  await expect(field).toBeFocused();
  await page.keyboard.type(taken);
  await page.keyboard.press("Enter");
  await page.getByRole("button", { name: /^Put ....-.... on this bag$/ }).click();
  await expect(page.getByText("is in use already")).toBeVisible();
  expect((await field.inputValue()).replace("-", "")).toBe(taken);
  await expectAccessible(page);
  await page.getByRole("radio", { name: "No tag at hand" }).check();
  await page.getByRole("button", { name: "Draw a code for this bag" }).click();
  await expect(page.getByText(/^Write ....-.... on the bag$/)).toBeVisible();
  await expect(page.getByText("Both codes open this bag.")).toBeVisible();
  for (const one of codesOf(code)) {
    await page.goto(`${server.url}/bags/${one.code}`);
    await expect(page.getByRole("heading", { level: 1 })).toContainText(code.slice(0, 4));
  }
});

test("a receipt that got lost on the way is not known to be one, and makes no second code", async ({
  page,
}) => {
  const code = desk.nextCode();
  await openDialog(page, code);
  await page.getByRole("radio", { name: "No tag at hand" }).check();
  await page.route(
    "**/replace-tag",
    async (route) => {
      await route.fetch();
      await route.abort();
    },
    { times: 1 },
  );
  const draw = page.getByRole("button", { name: "Draw a code for this bag" });
  await draw.click();
  await expect(page.getByText("it is not known whether this was saved")).toBeVisible();
  expect(codesOf(code)).toHaveLength(2);
  await draw.click();
  await expect(page.getByText("Both codes open this bag.")).toBeVisible();
  expect(codesOf(code)).toHaveLength(2);
});

test("a picture of a bag that is not saved yet is removed by whoever took it", async ({ page }) => {
  await desk.open(page);
  const photos = photosOf(page, "bag");
  await photos.choose(await phonePicture("blurred.jpg", "#1f46d6"));
  await expect(photos.shown).toHaveCount(1);
  const large = await photos.open(1);
  await large.getByRole("button", { name: "Remove photo" }).click();
  await large.getByRole("button", { name: "Remove", exact: true }).click();
  await expect(photos.shown).toHaveCount(0);
  expect(server.query("select 1 from photos where removed_at is null")).toEqual([]);
});
