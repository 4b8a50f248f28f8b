/** Invited, joined, forgotten, removed: the life of an account, on a phone, with the mails of the local folder. */
import { expect, test, type Browser, type Page } from "@playwright/test";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

const EMAIL = "brent@saltmarsh.example";
let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
});
test.afterAll(async () => {
  await server.close();
});

/** A phone of its own, where a page error or a breach of the policy fails the test. */
async function newPhone(browser: Browser): Promise<{ page: Page; faults: string[] }> {
  const page = await (await browser.newContext()).newPage();
  const faults: string[] = [];
  page.on("pageerror", (error) => faults.push(error.message));
  page.on("console", (message) => {
    if (/Content Security Policy|hydrat/i.test(message.text())) faults.push(message.text());
  });
  return { page, faults };
}

/** The link of the newest mail, once there are as many mails as that. */
async function mailedLink(page: Page, mails: number): Promise<string> {
  await expect(async () => {
    await page.goto(`${server.url}/dev/mail`);
    await expect(page.getByRole("listitem")).toHaveCount(mails, { timeout: 500 });
  }).toPass();
  const link = page.getByRole("listitem").first().getByRole("link");
  return (await link.getAttribute("href")) ?? "";
}

async function signInBy(page: Page, password: string): Promise<void> {
  await page.getByLabel("Mail address").fill(EMAIL);
  await page.getByLabel("Password", { exact: true }).fill(password);
  await page.getByRole("button", { name: "Sign in" }).click();
}

test("an account from invitation to removal", async ({ browser }) => {
  const coordinator = await newPhone(browser);
  const brent = await newPhone(browser);
  await server.signIn(coordinator.page.context(), "coordinator");

  await coordinator.page.goto(`${server.url}/people`);
  await coordinator.page.getByRole("button", { name: "Invite somebody" }).click();
  await expectAccessible(coordinator.page);
  await coordinator.page.getByLabel("Name").fill("Brent Knot");
  await coordinator.page.getByLabel("Mail address").fill(EMAIL);
  await coordinator.page.keyboard.press("Enter");
  await expect(coordinator.page.getByText(/^Invited[,;]/)).toBeVisible();
  await expectAccessible(coordinator.page);

  // Opening the link changes nothing; a bad password does not use it up; it works once.
  const invitation = await mailedLink(brent.page, 1);
  await brent.page.goto(invitation);
  await brent.page.goto(invitation);
  await expect(brent.page.getByRole("heading", { name: "Welcome, Brent Knot" })).toBeVisible();
  await expectAccessible(brent.page);
  await brent.page.getByLabel("New password", { exact: true }).fill("Password2026");
  await brent.page.keyboard.press("Enter");
  await expect(brent.page.getByText("one of the first that anybody tries")).toBeVisible();
  await brent.page.getByLabel("New password", { exact: true }).fill("tidal flats at dawn");
  await brent.page.keyboard.press("Enter");
  await brent.page.waitForURL("**/today");
  await brent.page.goto(invitation);
  await expect(brent.page.getByText("This link was used already")).toBeVisible();

  // Forgotten: the same words for an address that nobody has.
  const forgetful = await newPhone(browser);
  for (const address of ["not-here@saltmarsh.example", EMAIL]) {
    await forgetful.page.goto(`${server.url}/forgotten`);
    await expectAccessible(forgetful.page);
    await forgetful.page.getByLabel("Mail address").fill(address);
    await forgetful.page.keyboard.press("Enter");
    await expect(
      forgetful.page.getByText(`If somebody with the address ${address} is here`),
    ).toBeVisible();
  }
  await forgetful.page.goto(await mailedLink(forgetful.page, 2));
  await forgetful.page.getByLabel("New password", { exact: true }).fill("mudlarks wade slowly");
  await forgetful.page.keyboard.press("Enter");
  await forgetful.page.waitForURL("**/today");

  // The earlier session is over, and says so; the page that was open comes back after signing in.
  await brent.page.goto(`${server.url}/stock?form=flake`);
  await expect(brent.page.getByText("What you typed is kept")).toBeVisible();
  await expectAccessible(brent.page);
  await signInBy(brent.page, "tidal flats at dawn");
  await expect(brent.page.getByText("do not fit together")).toBeVisible();
  await signInBy(brent.page, "mudlarks wade slowly");
  await brent.page.waitForURL("**/stock?form=flake");

  // Changing the password ends the other phone's session and keeps this one.
  await brent.page.goto(`${server.url}/account`);
  await expectAccessible(brent.page);
  await brent.page.getByLabel("Present password", { exact: true }).fill("mudlarks wade slowly");
  await brent.page.getByLabel("New password", { exact: true }).fill("estuary lights blink");
  await brent.page.keyboard.press("Enter");
  await expect(brent.page.getByText("One other session was ended.")).toBeVisible();
  await forgetful.page.goto(`${server.url}/account`);
  await expect(forgetful.page).toHaveURL(/\/sign-in\?next=%2Faccount&ended=1/);

  // A new role counts from the next page; a removal too.
  await coordinator.page.goto(`${server.url}/people`);
  await coordinator.page.getByRole("button", { name: "Change Brent Knot" }).click();
  await coordinator.page.getByRole("dialog").getByLabel("Role").selectOption("donor");
  await coordinator.page.getByRole("button", { name: "Make donor" }).click();
  await expect(coordinator.page.getByText("Now donor")).toBeVisible();
  expect((await brent.page.goto(`${server.url}/stock`))?.status()).toBe(403);
  await coordinator.page.getByRole("button", { name: "Remove Brent Knot" }).click();
  await coordinator.page.getByRole("button", { name: "Remove Brent Knot now" }).click();
  await expect(coordinator.page.getByText(EMAIL)).toHaveCount(0);
  await brent.page.goto(`${server.url}/account`);
  await expect(brent.page).toHaveURL(/\/sign-in/);

  expect([...coordinator.faults, ...brent.faults, ...forgetful.faults]).toEqual([]);
});

test("signing out ends the session for a copied cookie too", async ({ browser }) => {
  const { page } = await newPhone(browser);
  const { cookie } = await server.session("lead");
  await page
    .context()
    .addCookies([{ ...cookie, url: server.url, httpOnly: true, sameSite: "Lax" }]);
  await page.goto(`${server.url}/account`);
  await page.getByRole("main").getByRole("button", { name: "Sign out", exact: true }).click();
  await page.waitForURL(`${server.url}/`);
  const copied = await fetch(`${server.url}/api/account`, {
    headers: { cookie: `${cookie.name}=${cookie.value}` },
  });
  expect(copied.status).toBe(401);
  expect(await copied.json()).toMatchObject({ code: "session-ended" });
});

test("five wrong passwords, then a wait, told in seconds", async ({ browser }) => {
  const { page } = await newPhone(browser);
  await page.goto(`${server.url}/sign-in`);
  for (let made = 0; made < 5; made += 1) {
    await page.getByLabel("Mail address").fill("volunteer@saltmarsh.example");
    await page.getByLabel("Password", { exact: true }).fill(`wrong one ${made}`);
    await page.getByRole("button", { name: "Sign in" }).click();
    await expect(page.getByText("do not fit together")).toBeVisible();
  }
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByText(/Wait \d+ seconds and try again/)).toBeVisible();
});
