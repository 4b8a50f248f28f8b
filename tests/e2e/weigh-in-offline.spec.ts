/** The weigh-in when the server is gone, a receipt is lost, or the session ended: nothing typed is lost. */

import { expect, test } from "@playwright/test";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import {
  codeField,
  gross,
  save,
  shown,
  tickets,
  waiting,
  weighInDesk,
} from "../support/weigh-in-page";

let server: E2eServer;
let desk: ReturnType<typeof weighInDesk>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  desk = weighInDesk(server);
});
test.afterAll(async () => {
  await server.close();
});

test("keeps a ticket while the server is gone, through a reload, and sends it once", async ({
  page,
}) => {
  await desk.open(page);
  const code = desk.nextCode();
  let tries = 0;
  await page.route("**/api/weigh-ins", async (route) => {
    tries += 1;
    await route.abort();
  });
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  await save(page).click();
  await expect(page.getByText("Saved on this phone")).toBeVisible();
  await expect(page.getByRole("link", { name: "1 waiting to send" })).toBeVisible();
  await expect(codeField(page)).toHaveValue("");
  expect(desk.netOf(code)).toEqual([]);
  await page.reload();
  await expect(waiting(page).getByText(`${shown(code)}, 2.500 kg`)).toBeVisible();
  const before = tries;
  await page.getByRole("button", { name: "Send now" }).click();
  await expect.poll(() => tries).toBeGreaterThan(before);
  await expect(waiting(page).getByText(`${shown(code)}, 2.500 kg`)).toBeVisible();
  // The server is back: the timer alone sends it, within a quarter of a minute.
  await page.unroute("**/api/weigh-ins");
  await expect(waiting(page)).toBeHidden({ timeout: 30_000 });
  await expect(tickets(page).getByRole("link", { name: shown(code), exact: true })).toBeVisible();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2500 }]);
});

test("a receipt that got lost on the way makes no second entry", async ({ page }) => {
  await desk.open(page);
  const code = desk.nextCode();
  let lost = 0;
  await page.route("**/api/weigh-ins", async (route) => {
    await route.fetch();
    lost += 1;
    await route.abort();
  });
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  await save(page).click();
  await expect(page.getByText("Saved on this phone")).toBeVisible();
  expect(lost).toBe(1);
  await page.unroute("**/api/weigh-ins");
  // Without a tap: coming back to the page is enough.
  await page.evaluate(() => window.dispatchEvent(new Event("focus")));
  await expect(waiting(page)).toBeHidden();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2500 }]);
});

test("keeps a ticket that was sent back, with its reason, to be changed by hand", async ({
  page,
}) => {
  await desk.open(page);
  const code = desk.nextCode();
  await page.route("**/api/weigh-ins", (route) => route.abort());
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  await save(page).click();
  await expect(page.getByText("Saved on this phone")).toBeVisible();
  // While it waits, the scale turns out to show steps of 200 g.
  server.query("update scales set d_mg = 200000");
  await page.unroute("**/api/weigh-ins");
  await page.evaluate(() => window.dispatchEvent(new Event("focus")));
  await expect(waiting(page).getByText("The scale shows steps of 200 g.")).toBeVisible();
  server.query("update scales set d_mg = 5000");
  await waiting(page).getByRole("button", { name: "Change it" }).click();
  await expect(codeField(page)).toHaveValue(shown(code));
  await expect(gross(page)).toHaveValue("2.500");
  await page.reload();
  await gross(page).fill("2.4");
  await save(page).click();
  await expect(page.getByText("Saved", { exact: true })).toBeVisible();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2400 }]);
});

test("what was typed is still there when the session ended", async ({ page }) => {
  await desk.open(page);
  const code = desk.nextCode();
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  server.query("update sessions set ended_at = ? where ended_at is null", Date.now());
  await save(page).click();
  await expect(
    page.getByText("Your session has ended. What you typed is still here"),
  ).toBeVisible();
  await page.getByRole("link", { name: "Sign in" }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await desk.open(page);
  await expect(codeField(page)).toHaveValue(code);
  await expect(gross(page)).toHaveValue("2.5");
  await save(page).click();
  await expect(page.getByText("Saved", { exact: true })).toBeVisible();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2500 }]);
});

test("another helper of the same phone neither sees nor sends what waits", async ({ page }) => {
  await desk.open(page);
  const code = desk.nextCode();
  await page.route("**/api/weigh-ins", (route) => route.abort());
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  await save(page).click();
  await expect(page.getByText("Saved on this phone")).toBeVisible();
  await page.unroute("**/api/weigh-ins");
  await server.signIn(page.context(), "lead");
  await page.goto(`${server.url}/weigh-in`);
  await expect(page.getByText("1 ticket waits here until its helper signs in")).toBeVisible();
  await expect(waiting(page).getByText(shown(code))).toHaveCount(0);
  await page.evaluate(() => window.dispatchEvent(new Event("focus")));
  await page.waitForTimeout(1000);
  expect(desk.netOf(code)).toEqual([]);
  await desk.open(page);
  await expect(waiting(page)).toBeHidden();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2500 }]);
});
