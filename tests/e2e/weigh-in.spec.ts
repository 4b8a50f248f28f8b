/** The weigh-in on the built program, at 360 px: by thumb and by keyboard, with good input and bad. */
import { expect, test } from "@playwright/test";
import { violations } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { codeField, gross, save, shown, tickets, weighInDesk } from "../support/weigh-in-page";

let server: E2eServer;
let desk: ReturnType<typeof weighInDesk>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  desk = weighInDesk(server);
});
test.afterAll(async () => {
  await server.close();
});

test("weighs a bag with the keyboard alone, and undoes it", async ({ page }) => {
  await desk.open(page);
  const code = desk.nextCode();
  const focused = () => page.evaluate(() => document.activeElement?.getAttribute("name") ?? "");
  for (let presses = 0; presses < 20 && (await focused()) !== "code"; presses += 1) {
    await page.keyboard.press("Tab");
  }
  expect(await focused()).toBe("code");
  await page.keyboard.type(code.toLowerCase());
  await page.keyboard.press("Enter");
  await expect(page.getByText("Harbour Road Library").first()).toBeVisible();
  expect(await focused()).toBe("readings.0.gross");
  await page.keyboard.type("3,36");
  await expect(page.getByText("reads as 3.360 kg")).toBeVisible();
  await page.keyboard.press("Tab");
  expect(await focused()).toBe("readings.0.container.choice");
  await page.keyboard.type("Blue");
  await expect(page.getByLabel("Net in kilograms")).toHaveText("2.160");
  await page.keyboard.press("Shift+Tab");
  await page.keyboard.press("Enter");
  await expect(page.getByText("Saved", { exact: true })).toBeVisible();
  expect(desk.netOf(code)).toEqual([{ state: "posted", grams: 2160 }]);
  // Ready for the next bag: the code field is empty, the crate stays.
  await expect(codeField(page)).toHaveValue("");
  await expect(page.getByLabel("Container")).not.toHaveValue("");

  const undo = page.getByRole("button", { name: `Undo ${shown(code)}` });
  await undo.focus();
  await page.keyboard.press("Enter");
  await expect(tickets(page).getByText("Undone")).toBeVisible();
  expect(desk.netOf(code)).toEqual([{ state: "undone", grams: 2160 }]);
  expect(server.query("select sum(grams) as grams from balances")).toEqual([{ grams: 0 }]);
});

test("tells a wrong check character before any request, and an unknown code after one", async ({
  page,
}) => {
  await desk.open(page);
  const asked: string[] = [];
  page.on("request", (request) => {
    if (request.url().includes("/api/bags/")) asked.push(request.url());
  });
  const right = desk.nextCode();
  const wrong = right.slice(0, 7) + (right[7] === "7" ? "8" : "7");
  await codeField(page).fill(wrong);
  await expect(page.getByText("That is no code of a tag here.")).toBeVisible();
  expect(asked).toEqual([]);
  await codeField(page).fill("0000-000H");
  await expect(page.getByText("No tag of this scheme has the code 0000-000H.")).toBeVisible();
  expect(asked).toHaveLength(1);
});

test("gives each bad reading its own sentence and loses nothing", async ({ page }) => {
  await desk.open(page);
  const code = desk.nextCode();
  await codeField(page).fill(code);
  await page.getByLabel("Container").selectOption({ index: 1 });
  const cases = [
    ["1,234", "could be a thousand or a fraction"],
    ["2.343", "The scale shows steps of 5 g. 2.343 kg cannot be right."],
    ["0.5", "Container and sack weigh 1.200 kg, more than the 0.500 kg on the scale."],
    ["31", "Bench scale carries at most 30.000 kg"],
    ["1.2", "Nothing is left after the tare."],
    ["abc", "is not a weight"],
  ] as const;
  for (const [typed, words] of cases) {
    await gross(page).fill(typed);
    await save(page).click();
    await expect(page.getByText(words)).toBeVisible();
    await expect(gross(page)).toHaveValue(typed);
    await expect(codeField(page)).toHaveValue(code);
  }
  expect(desk.netOf(code)).toEqual([]);
});

test("keeps the second reading of a bag for review, and says whose the first was", async ({
  page,
}) => {
  await desk.open(page);
  const code = desk.nextCode();
  for (const weight of ["2.5", "2.6"]) {
    await codeField(page).fill(code);
    await gross(page).fill(weight);
    await save(page).click();
    await expect(codeField(page)).toHaveValue("");
  }
  await expect(page.getByText(/was weighed by Test volunteer on .*: 2\.500 kg/)).toBeVisible();
  expect(desk.netOf(code).map(({ state }) => state)).toEqual(["posted", "for-review"]);
});

test("posts a bag of one kind into its lot, and the same again for the next", async ({ page }) => {
  await desk.open(page);
  const [one, two] = [desk.nextCode(), desk.nextCode()];
  await codeField(page).fill(one);
  await gross(page).fill("1.5");
  await page.getByRole("radio", { name: "HDPE" }).check();
  await page.getByRole("radio", { name: "Blue", exact: true }).check();
  await page.getByLabel("The whole bag is one kind").check();
  await save(page).click();
  await expect(page.getByText("Choose what it is, such as lids.")).toBeVisible();
  await page.getByRole("radio", { name: "Lids" }).check();
  await save(page).click();
  await expect(page.getByText(/It is in lot 1, which now holds 1\.500 kg/)).toBeVisible();
  await codeField(page).fill(two);
  await gross(page).fill("0.5");
  await page.getByRole("button", { name: "Same as last" }).click();
  await save(page).click();
  await expect(page.getByText(/which now holds 2\.000 kg/)).toBeVisible();
});

test("says plainly that there is no camera, and the code can be typed", async ({ page }) => {
  await desk.open(page);
  await page.getByRole("button", { name: "Scan with the camera" }).click();
  await expect(page.getByText("No camera", { exact: true })).toBeVisible();
  await page.getByRole("button", { name: "Close" }).click();
  const code = desk.nextCode();
  // A hand scanner types the tag's whole address and Enter.
  await codeField(page).focus();
  await page.keyboard.type(`HTTPS://SHED.EXAMPLE/B/${code}`);
  await page.keyboard.press("Enter");
  await expect(codeField(page)).toHaveValue(shown(code));
  await expect(gross(page)).toBeFocused();
});

test("gives a bag without a tag a spare one", async ({ page }) => {
  await desk.open(page);
  await page.getByRole("button", { name: "No tag? Give it a spare one" }).click();
  await page.getByRole("button", { name: "Draw a code for this bag" }).click();
  await expect(page.getByText(/^Write ....-.... on the bag/)).toBeVisible();
  await gross(page).fill("1.1");
  await save(page).click();
  await expect(page.getByText("Saved", { exact: true })).toBeVisible();
  await expect(tickets(page).getByText("Not known").first()).toBeVisible();
});

for (const colorScheme of ["light", "dark"] as const) {
  test(`has no accessibility fault at 360 px, ${colorScheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme });
    await desk.open(page);
    await codeField(page).fill(desk.nextCode());
    await gross(page).fill("2.343");
    await page.getByRole("radio", { name: "PVC, other" }).check();
    await page.getByLabel("The whole bag is one kind").check();
    await save(page).click();
    await expect(page.getByText("The scale shows steps of 5 g.")).toBeVisible();
    for (const address of ["/weigh-in", "/today"]) {
      if (address !== "/weigh-in") await page.goto(server.url + address);
      await expect(page.getByRole("heading", { level: 1 })).toBeAttached();
      expect(await violations(page)).toEqual([]);
    }
    const width = await page.evaluate(() => document.documentElement.scrollWidth);
    expect(width).toBeLessThanOrEqual(360);
  });
}
