/** A scale's day on the built program: not checked, failed twice, the other scale first, and a lead's word. */
import { expect, test } from "@playwright/test";
import { newId } from "@/lib/core/ids";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
});
test.afterAll(async () => {
  await server.close();
});

test("checks a scale, offers the other one first, and a lead clears it", async ({ page }) => {
  await server.signIn(page.context(), "coordinator");
  const second = await page.request.post(`${server.url}/api/scales`, {
    headers: { origin: server.url },
    data: {
      requestId: newId(),
      name: "Hanging scale",
      class: "none",
      maxMilligrams: 50_000_000,
      dMilligrams: 10_000,
      statedAccuracyMilligrams: 20_000,
    },
  });
  expect(second.status(), await second.text()).toBe(200);
  const [first] = server.query<{ id: string; name: string; d: number }>(
    "select id, name, d_mg as d from scales order by number limit 1",
  );
  if (!first) throw new Error("The scheme has no scale for this test.");

  await page.goto(`${server.url}/scales`);
  await page.getByRole("button", { name: "Add a check weight" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Name").fill("Green dumbbell");
  await dialog.getByLabel("Mass").fill("2");
  await dialog.getByLabel("Known from").fill("Certificate 118");
  await expectAccessible(page);
  await dialog.getByRole("button", { name: "Add it" }).click();
  await expect(page.getByRole("rowheader", { name: "Green dumbbell" })).toBeVisible();

  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/weigh-in`);
  const scales = page.getByLabel("Scale", { exact: true });
  await scales.selectOption({ label: first.name });
  await expect(page.getByText("Not checked today")).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("link", { name: "Check it now" }).click();
  await expect(page.getByRole("heading", { name: first.name })).toBeVisible();
  await expectAccessible(page);
  const shows = page.getByLabel("The scale shows");
  // Ten steps too much is beyond the limit of every class at this load.
  const tooMuch = String((2_000_000 + 10 * first.d) / 1_000_000);
  await shows.fill(tooMuch);
  await page.getByRole("button", { name: "Save the check" }).click();
  await expect(page.getByText("check it once more")).toBeVisible();
  await shows.fill(tooMuch);
  await page.getByRole("button", { name: "Save the repeated check" }).click();
  await expect(page.getByText("No other scale was checked today.")).toBeVisible();
  await expect(shows).toHaveCount(0);
  await expectAccessible(page);

  await page.goto(`${server.url}/scales`);
  await page.getByRole("link", { name: "Check Hanging scale" }).click();
  await shows.fill("2.02");
  await page.getByRole("button", { name: "Save the check" }).click();
  await expect(page.getByText("The scale is right")).toBeVisible();

  await page.goto(`${server.url}/weigh-in`);
  await scales.selectOption({ label: first.name });
  await page.getByRole("button", { name: "Use Hanging scale" }).click();
  await expect(page.getByText("Checked today")).toBeVisible();
  await expect(scales.locator("option:checked")).toHaveText("Hanging scale");

  await server.signIn(page.context(), "lead");
  await page.goto(`${server.url}/scales/${first.id}`);
  await expect(page.getByRole("heading", { name: "Readings to look at" })).toBeVisible();
  await page.getByRole("button", { name: "Clear it for today" }).click();
  const clear = page.getByRole("dialog");
  await clear.getByLabel("Why its readings can be believed").fill("Levelled it");
  await expectAccessible(page);
  await clear.getByRole("button", { name: "Clear it" }).click();
  await expect(page.getByText("Cleared today")).toBeVisible();
  expect(server.query("select passed from scale_checks order by recorded_at")).toEqual([
    { passed: 0 },
    { passed: 0 },
    { passed: 1 },
  ]);
});
