/** What leaves the shed, on the built program at 360 px: a removal, its question, its receipt and its correction. */
import { expect, test, type Page } from "@playwright/test";
import { newId } from "@/lib/core/ids";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { phonePicture, photosOf } from "../support/photo-page";

let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  await server.storage.start();
});
test.afterAll(async () => {
  await server.close();
});

const post = (page: Page, path: string, data: Record<string, unknown>) =>
  page.request.post(`${server.url}${path}`, {
    headers: { origin: server.url },
    data: { requestId: newId(), ...data },
  });

/** A bag of so many grams is weighed in and turned away whole, so that the reject bin holds it. */
async function fillBin(page: Page, grams: number): Promise<void> {
  const [bag] = server.query<{ code: string }>(
    "select code from bags where state not in ('weighed', 'sorted', 'closed') limit 1",
  );
  const [scale] = server.query<{ id: string }>("select id from scales order by number limit 1");
  if (!bag || !scale) throw new Error("The scheme has no tag or no scale for this test.");
  const reading = {
    grossMilligrams: grams * 1000,
    containerId: null,
    containerTareMilligrams: 0,
    sackId: null,
    sackTareMilligrams: 0,
  };
  const common = { code: bag.code, scaleId: scale.id };
  const weighed = await post(page, "/api/weigh-ins", {
    ...common,
    occurredAt: Date.now(),
    readings: [reading],
  });
  expect(weighed.status(), await weighed.text()).toBe(200);
  await page.goto(`${server.url}/sorting/${bag.code}`);
  await page.getByRole("button", { name: "Add reject" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("radio", { name: "Stuck-together materials" }).check();
  await dialog.getByLabel("The scale shows").fill(String(grams / 1000));
  await dialog.getByRole("button", { name: /^Turn/ }).click();
  await page.getByRole("button", { name: /^Save / }).click();
  await expect
    .poll(() =>
      server.query<{ grams: number }>(
        "select b.grams from balances b join holders h on h.id = b.holder_id where h.kind = 'reject-bin'",
      ),
    )
    .toEqual([{ grams }]);
}

test("takes rejects away, asks about too much, proves it by a receipt and corrects it", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  await fillBin(page, 4000);
  await page.goto(`${server.url}/removals`);
  await expect(page.getByText("A lead or coordinator records")).toBeVisible();
  await expect(page.getByRole("link", { name: "Take rejects away" })).toHaveCount(0);

  await server.signIn(page.context(), "coordinator");
  await page.goto(`${server.url}/removals/destinations`);
  await page.getByRole("button", { name: "Add a destination" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("radio", { name: "Passed on" }).check();
  await dialog.getByLabel("Receiver", { exact: true }).fill("Quay Recycling Works");
  await dialog.getByLabel("Its registration or permit number").fill("PR/0418");
  await dialog.getByLabel("Carrier", { exact: true }).fill("Estuary Carriers");
  await dialog.getByLabel("List of Waste code").fill("19 12");
  await dialog.getByRole("button", { name: "Add it" }).click();
  await expect(dialog.getByText("has six figures")).toBeVisible();
  await expectAccessible(page);
  await dialog.getByLabel("List of Waste code").fill("191204");
  await dialog.getByRole("button", { name: "Add it" }).click();
  await expect(page.getByText("19 12 04")).toBeVisible();
  await expectAccessible(page);

  await server.signIn(page.context(), "lead");
  await page.goto(`${server.url}/removals`);
  await expectAccessible(page);
  await page.getByRole("link", { name: "Take rejects away" }).click();
  await page.getByLabel("The scale shows").fill("5");
  await page.getByLabel("Note or ticket number").fill("TN 118");
  await page.reload();
  await expect(page.getByText("Typed before, not saved")).toBeVisible();
  await expect(page.getByLabel("Note or ticket number")).toHaveValue("TN 118");
  await expectAccessible(page);
  await page.getByRole("button", { name: "Take away 5.000 kg" }).click();
  const asked = page.getByRole("alertdialog");
  await expect(asked.getByText("1.000 kg more than can be explained")).toBeVisible();
  await expectAccessible(page);
  await asked.getByRole("button", { name: "Weigh again" }).click();
  await expect(page.getByLabel("Note or ticket number")).toHaveValue("TN 118");
  await page.getByLabel("The scale shows").fill("3.9");
  await page.getByLabel("Nothing is left there").check();
  await expect(page.getByText("The missing 0.100 kg goes down as difference.")).toBeVisible();
  await page.getByRole("button", { name: "Take away 3.900 kg" }).click();
  await expect(page.getByText("Passed on, unproven").first()).toBeVisible();
  await expectAccessible(page);
  expect(
    server.query(
      "select account, cause, grams from lines where account in ('passed-on', 'difference') order by entry_id, seq",
    ),
  ).toEqual([
    { account: "passed-on", cause: "unproven", grams: 3900 },
    { account: "difference", cause: null, grams: 100 },
  ]);

  const photos = photosOf(page, "removal");
  await photos.choose(await phonePicture("ticket.jpg", "#1f46d6"));
  await expect(photos.shown).toHaveAttribute("alt", /^Taken away from the reject bin, 3\.900 kg, /);

  await page.getByLabel("Number of the receipt").fill("QR 7");
  await page.getByLabel("Weight received").fill("3.88");
  await page.getByRole("button", { name: "Save the receipt" }).click();
  await expect(page.getByText("Passed on, proven")).toBeVisible();
  await expect(page.getByText("0.020 kg less than here")).toBeVisible();
  await expectAccessible(page);

  await page.getByRole("link", { name: "Correct", exact: true }).click();
  await expect(page.getByText("Receipt QR 7 goes along")).toBeVisible();
  await page.getByLabel("The scale shows").fill("3.8");
  await page.getByRole("button", { name: "Correct to 3.800 kg" }).click();
  await expect(page.getByText("Say it in a few words")).toBeVisible();
  await expectAccessible(page);
  await page.getByLabel("Why it is corrected").fill("Read the wrong line");
  await page.getByRole("button", { name: "Correct to 3.800 kg" }).click();
  await expect(page.getByText("It stands in the place of")).toBeVisible();
  await expect(page.getByRole("heading", { name: "Receipt QR 7" })).toBeVisible();
  expect(
    server.query(
      "select sum(passed_proven) as proven, sum(passed_unproven) as unproven, sum(difference) as difference from totals_month",
    ),
  ).toEqual([{ proven: 3800, unproven: 0, difference: 200 }]);
  // What was typed is kept only until it is saved.
  expect(await page.evaluate(() => Object.keys(localStorage))).not.toContainEqual(
    expect.stringContaining("removal-bin"),
  );
  await page.getByRole("link", { name: "another one" }).click();
  await expect(page.getByText("Read the wrong line")).toBeVisible();
});
