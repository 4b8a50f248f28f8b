/**
 * Sessions on the built program, at 360 px: five bags put aside and taken up on another phone, two people at one
 * table, a session corrected, and yesterday's weigh-in corrected after its lot was used.
 */
import { expect, test, type Browser, type Page } from "@playwright/test";
import type { Role } from "@/lib/core/permissions";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { addPile, onPan, save, shown, sortingShed } from "../support/sorting-page";

let server: E2eServer;
let shed: ReturnType<typeof sortingShed>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  shed = sortingShed(server);
});
test.afterAll(async () => {
  await server.close();
});

const KEPT = "Kept, not saved yet";

/** Another phone. */
async function phone(browser: Browser, role: Role): Promise<Page> {
  const context = await browser.newContext({
    viewport: { width: 360, height: 740 },
    locale: "en-GB",
    timezoneId: "UTC",
  });
  await server.signIn(context, role);
  return context.newPage();
}

test("five bags are put aside, taken up on another phone, and saved as one", async ({
  page,
  browser,
}) => {
  await server.signIn(page.context(), "volunteer");
  const codes: string[] = [];
  for (let at = 0; at < 5; at += 1) codes.push(await shed.weighedBag(page, 1000 + at * 100));
  await page.goto(`${server.url}/sorting`);
  for (const code of codes.slice(0, 4)) {
    await page.getByLabel(`Sort ${shown(code)} with others`).check();
  }
  await page.getByRole("button", { name: "Sort 4 together, 4.600 kg" }).click();
  await expect(page.getByText("of 4.600 kg")).toBeVisible();
  // The fifth is put on the table by its tag.
  await page.getByRole("button", { name: "Add a bag" }).click();
  const adding = page.getByRole("dialog");
  await adding.getByLabel("Code on the tag").fill(codes[4] ?? "");
  await adding.getByRole("button", { name: "Add it" }).click();
  await expect(adding.getByText(`${shown(codes[4] ?? "")} is on the table`)).toBeVisible();
  await expectAccessible(page);
  await adding.getByRole("button", { name: "Done" }).click();
  await expect(page.getByText("of 6.000 kg")).toBeVisible();
  await addPile(page, "Blue", "4");
  await expect(page.getByText(KEPT)).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("button", { name: "Put aside" }).click();
  await expect(page.getByRole("region", { name: "Put aside" })).toContainText("5 bags, 6.000 kg");
  await expectAccessible(page);

  const other = await phone(browser, "lead");
  await other.goto(`${server.url}/sorting`);
  await other.getByRole("link", { name: "Take up" }).click();
  await expect(other.getByText("2.000 kg still to weigh.")).toBeVisible();
  await addPile(other, "White", "2");
  await expect(save(other)).toHaveText("Save 2 weights, close 5 bags");
  await save(other).click();
  await expect(other.getByText("5 bags, tipped together")).toBeVisible();
  await expectAccessible(other);
  expect(
    server.query(
      "select net_grams as net, difference_grams as difference from sorting_sessions where state = 'closed'",
    ),
  ).toEqual([{ net: 6000, difference: 0 }]);

  // A lead corrects it: the table comes back with what was read.
  await other.getByRole("link", { name: "Correct", exact: true }).click();
  await expect(other.getByText("All of it is on the table.")).toBeVisible();
  await other.getByRole("button", { name: "Correct it" }).click();
  await expect(other.getByText("Say it in a few words")).toBeVisible();
  await expectAccessible(other);
  await other.getByRole("button", { name: /^White HDPE/ }).click();
  await other.getByRole("dialog").getByRole("radio", { name: "Green", exact: true }).check();
  await other.getByRole("dialog").getByRole("button", { name: /^Put/ }).click();
  await other.getByLabel("Why it is corrected").fill("The second pile was green");
  await other.getByRole("button", { name: "Correct it" }).click();
  await expect(other.getByText("Corrected", { exact: true })).toBeVisible();
  await other.getByRole("link", { name: "See what stands now" }).click();
  await expect(other.getByText("Green HDPE")).toBeVisible();
  await other.getByRole("link", { name: "an earlier one" }).click();
  await expect(other.getByText("The second pile was green")).toBeVisible();
  expect(shed.lotSums()).toEqual([{ grams: 4000 }, { grams: 0 }, { grams: 2000 }]);
  await other.context().close();
});

test("two people at one table see each other, and neither loses what was typed", async ({
  page,
  browser,
}) => {
  test.setTimeout(90_000);
  await server.signIn(page.context(), "volunteer");
  const code = await shed.weighedBag(page, 3000);
  await page.goto(`${server.url}/sorting/${code}`);
  await addPile(page, "Red", "1");
  await expect(page.getByText(KEPT)).toBeVisible();

  // The tag leads the other to the same table.
  const other = await phone(browser, "lead");
  await other.goto(`${server.url}/sorting/${code}`);
  await expect(other.getByText("Test volunteer has this open too.")).toBeVisible();
  await expect(other.getByText("2.000 kg still to weigh.")).toBeVisible();

  // Both weigh on; the second to be kept is shown the other's.
  await other.route("**/api/sortings/drafts/**", (route) => route.abort());
  await addPile(other, "Yellow", "0.7");
  await expect(other.getByText("Kept on this phone; the server does not answer.")).toBeVisible();
  await addPile(page, "Orange", "0.5");
  await expect(page.getByText(KEPT)).toBeVisible();
  await page.waitForTimeout(2500);
  await other.unroute("**/api/sortings/drafts/**");
  const choice = other.getByRole("alertdialog");
  await expect(choice.getByText("Test volunteer weighed here too")).toBeVisible({
    timeout: 30_000,
  });
  await expect(choice.getByRole("region", { name: "Yours" })).toContainText("Yellow HDPE");
  await expect(choice.getByRole("region", { name: /volunteer/ })).toContainText("Orange HDPE");
  await expectAccessible(other);
  await choice.getByRole("button", { name: "Put both together" }).click();
  await expect(other.getByText("0.800 kg still to weigh.")).toBeVisible();
  // Out of reach, so that this pile is typed before the word of the other's saving arrives.
  await page.route("**/api/sortings/drafts/**", (route) => route.abort());
  await addPile(page, "Pink", "1.5");
  await expect(page.getByText("Kept on this phone; the server does not answer.")).toBeVisible();
  await addPile(other, "Black", "0.8");
  await save(other).click();
  await expect(other.getByText("Sorted by Test lead")).toBeVisible();

  // The first to save won; the second is told, and the piles are still there.
  await page.unroute("**/api/sortings/drafts/**");
  await expect(page.getByText("It was saved meanwhile")).toBeVisible({ timeout: 30_000 });
  await expect(page.getByText("Pink HDPE")).toBeVisible();
  await expect(save(page)).toBeHidden();
  await page.getByRole("link", { name: "See what was saved" }).click();
  await expect(page.getByText("Sorted by Test lead")).toBeVisible();
  await other.context().close();
});

test("a bag that was sorted meanwhile is taken off the table, and the piles stay", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const [one, two] = [await shed.weighedBag(page, 1000), await shed.weighedBag(page, 500)];
  await page.goto(`${server.url}/sorting/${one}`);
  await addPile(page, "Purple", "1");
  await shed.post(page, "/api/sortings", {
    codes: [two],
    scaleId: shed.scaleId,
    occurredAt: Date.now(),
    piles: [],
    rejects: [{ reason: "food", reading: onPan(500) }],
  });
  await page.getByRole("button", { name: "Add a bag" }).click();
  const adding = page.getByRole("dialog");
  await adding.getByLabel("Code on the tag").fill(two);
  await page.keyboard.press("Enter");
  await expect(adding.getByText("Sorted already")).toBeVisible();
  await adding.getByRole("button", { name: "Done" }).click();
  await expect(page.getByText("All of it is on the table.")).toBeVisible();
});

test("yesterday's weigh-in is corrected after its lot was used", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  const code = await shed.weighedBag(page, 2000, {
    occurredAt: Date.now() - 24 * 3_600_000,
    polymer: "PP",
    kind: "tubs",
    colourCode: "white",
    oneKind: true,
  });
  const [lot] = server.query<{ number: number }>("select max(number) as number from lots");
  await shed.post(page, `/api/lots/${lot?.number ?? 0}/split`, {
    occurredAt: Date.now(),
    amount: { scaleId: shed.scaleId, readings: [onPan(1500)] },
  });
  await page.goto(`${server.url}/bags/${code}`);
  await page.getByRole("link", { name: "See the ticket" }).click();
  await expect(page.getByText("Moved to another lot")).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("link", { name: "Correct", exact: true }).click();
  await expect(page.getByLabel("The scale shows")).toHaveValue("2.000");
  await expect(page.getByLabel("The whole bag is one kind")).toBeChecked();
  await expectAccessible(page);
  await page.getByLabel("The scale shows").fill("1.2");
  await page.getByLabel("Why it is corrected").fill("The display was read wrong");
  await page.getByRole("button", { name: "Correct to 1.200 kg" }).click();
  await expect(page.getByText("now counts 1.200 kg")).toBeVisible();
  // It went through, and what was used is named.
  await expect(page.getByText("Moved to another lot")).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("link", { name: "See what stands now" }).click();
  await page.getByRole("link", { name: "an earlier one" }).click();
  await expect(page.getByText("The display was read wrong")).toBeVisible();
  expect(
    server.query(
      `select w.state, w.net_grams as grams from weigh_ins w join bags b on b.id = w.bag_id
        where b.code = ? order by w.recorded_at, w.state`,
      code,
    ),
  ).toEqual([
    { state: "corrected", grams: 2000 },
    { state: "posted", grams: 1200 },
  ]);
  // The lot could give only what it had: no holder is below zero.
  expect(server.query("select count(*) as below from balances where grams < 0")).toEqual([
    { below: 0 },
  ]);
});

test("a second reading is set aside with a reason, another is let count", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  const again = async (grams: number): Promise<string> => {
    const code = await shed.weighedBag(page, grams);
    await shed.post(page, "/api/weigh-ins", {
      code,
      scaleId: shed.scaleId,
      occurredAt: Date.now(),
      readings: [onPan(grams + 100)],
    });
    return code;
  };
  const [one, two] = [await again(1000), await again(1500)];
  await page.goto(`${server.url}/weigh-ins/for-review`);
  const of = (code: string) => page.getByRole("listitem").filter({ hasText: shown(code) });
  await expect(of(one)).toContainText("The second is 0.100 kg more.");
  await expectAccessible(page);
  await of(one).getByRole("button", { name: "Set second aside" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("button", { name: "Set it aside" }).click();
  await expect(dialog.getByText("Say it in a few words")).toBeVisible();
  await dialog.getByLabel("Why it is corrected").fill("The crate was on the scale");
  await dialog.getByRole("button", { name: "Set it aside" }).click();
  await expect(page.getByText("Set aside; the first counts")).toBeVisible();
  await expect(of(one)).toBeHidden();
  await of(two).getByRole("button", { name: "Count the second" }).click();
  await dialog.getByLabel("Why it is corrected").fill("The first was read wrong");
  await dialog.getByRole("button", { name: "Count 1.600 kg" }).click();
  await expect(page.getByText("now counts 1.600 kg")).toBeVisible();
  await expect(page.getByText("Nothing to decide")).toBeVisible();
});
