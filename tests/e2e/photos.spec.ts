/** Photos of bags and lots: before and after the ticket, through bad signal and bad files, looked at and removed. */
import { expect, test, type Page } from "@playwright/test";
import { newId } from "@/lib/core/ids";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import {
  comeBack,
  emptyFile,
  heicPicture,
  noPicture,
  phonePicture,
  photosOf,
  type PickedFile,
} from "../support/photo-page";
import { codeField, gross, save, weighInDesk } from "../support/weigh-in-page";

let server: E2eServer;
let desk: ReturnType<typeof weighInDesk>;
let blue: PickedFile;
let green: PickedFile;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  await server.storage.start();
  desk = weighInDesk(server);
  blue = await phonePicture("blue.jpg", "#1f46d6");
  green = await phonePicture("green.jpg", "#2f9e6e", { width: 1200, height: 1600 });
});
test.afterAll(async () => {
  await server.close();
});

const photosIn = (code: string) =>
  server.query<{ width: number; height: number }>(
    `select p.width, p.height from photos p join weigh_ins w on w.id = p.subject_id
       join bags b on b.id = w.bag_id where b.code = ? and p.removed_at is null order by p.added_at`,
    code,
  );

async function saveBag(page: Page, code: string): Promise<void> {
  await codeField(page).fill(code);
  await gross(page).fill("2.5");
  await save(page).click();
  await expect(page.getByText("Saved", { exact: true })).toBeVisible();
}

/** A bag that is weighed in and open in front of a role. */
async function openBag(page: Page): Promise<string> {
  await desk.open(page);
  const code = desk.nextCode();
  await saveBag(page, code);
  await page.goto(`${server.url}/bags/${code}`);
  return code;
}

/** What comes from the program's own storage and session is cut off; pages still load. */
const cutOff = (page: Page) => page.route(/\/api\/(uploadthing|account)/, (route) => route.abort());

test("a photo may come before its ticket, and stays with its bag", async ({ page }) => {
  await desk.open(page);
  const photos = photosOf(page, "bag");
  await photos.choose(blue);
  await expect(photos.shown).toHaveCount(1);
  const code = desk.nextCode();
  await saveBag(page, code);
  // The next bag begins with nothing of the last.
  await expect(photos.shown).toHaveCount(0);
  await photos.choose(green);
  await expect(photos.shown).toHaveCount(1);
  const next = desk.nextCode();
  await saveBag(page, next);
  await page.goto(`${server.url}/bags/${code}`);
  await expect(photos.shown).toHaveCount(1);
  await expect(photos.shown).toHaveAttribute("alt", /^Plastic to sort, 2\.500 kg, \d+ \w+ \d{4}$/);
  // Scaled and upright before they left; one each.
  expect(photosIn(code)).toEqual([{ width: 1600, height: 1200 }]);
  expect(photosIn(next)).toEqual([{ width: 1200, height: 1600 }]);
  const address = (await photos.shown.getAttribute("src")) ?? "";
  const sent = await page.request.get(server.url + address.replace("thumb", "large"));
  expect(sent.headers()["content-type"]).toBe("image/jpeg");
  expect((await sent.body()).includes("Exif")).toBe(false);
});

test("the nearest colours are offered, never chosen, and not for clear", async ({ page }) => {
  await desk.open(page);
  await photosOf(page, "bag").choose(blue);
  const help = page.getByRole("group", { name: "Colours from the photo" });
  await expect(help.getByRole("button")).toHaveCount(3);
  await expect(help.getByRole("button").first()).toHaveText("Blue");
  const tiles = page.getByRole("group", { name: "Colour", exact: true });
  await expect(tiles.getByRole("radio", { checked: true })).toHaveCount(0);
  await help.getByRole("button", { name: "Blue", exact: true }).click();
  await expect(tiles.getByRole("radio", { name: "Blue", exact: true })).toBeChecked();
  await tiles.getByRole("radio", { name: /Clear/ }).check();
  await expect(help).toBeHidden();
});

test("each file that is no photo is named with its own sentence; the others go", async ({
  page,
}) => {
  await openBag(page);
  const photos = photosOf(page, "bag");
  await photos.choose(noPicture, heicPicture, emptyFile, blue);
  await expect(photos.shown).toHaveCount(1);
  const said = photos.part.getByRole("alert");
  await expect(said).toContainText("letter.jpg: This file is not a picture");
  await expect(said).toContainText("IMG_2041.HEIC: This picture is in the HEIC form");
  await expect(said).toContainText("empty.jpg: This file is empty");
  await photos.choose(...Array.from({ length: 12 }, () => green));
  const full = photos.part.getByText(/There is room for 12 pictures/);
  await expect(full.first()).toBeVisible({ timeout: 60_000 });
  await expect(photos.shown).toHaveCount(12, { timeout: 60_000 });
});

test("a sending is cancelled, and sent when asked again", async ({ page }) => {
  const code = await openBag(page);
  const photos = photosOf(page, "bag");
  await page.route(/x-ut-identifier/, async (route) => {
    // The file itself hangs; what goes before it does not.
    if (route.request().method() !== "PUT") await route.continue();
  });
  await photos.choose(blue);
  await expect(photos.part.getByRole("progressbar")).toBeVisible();
  await photos.part.getByRole("button", { name: /^Cancel/ }).click();
  await expect(photos.part.getByText("Cancelled. It is still on this phone.")).toBeVisible();
  await expect(page.getByRole("link", { name: "1 photo to look at" })).toBeVisible();
  expect(photosIn(code)).toEqual([]);
  await page.unroute(/x-ut-identifier/);
  await photos.part.getByRole("button", { name: /^Try again/ }).click();
  await expect(photos.shown).toHaveCount(1);
  expect(photosIn(code)).toHaveLength(1);
});

test("the storage is down: the photo waits, and goes when it is back", async ({ page }) => {
  const code = await openBag(page);
  const photos = photosOf(page, "bag");
  await server.storage.stop();
  await photos.choose(blue);
  await expect(photos.part.getByText("The picture storage does not answer.")).toBeVisible();
  await expect(page.getByText(/uploadthing/i)).toHaveCount(0);
  await server.storage.start();
  await photos.part.getByRole("button", { name: /^Try again/ }).click();
  await expect(photos.shown).toHaveCount(1);
  expect(photosIn(code)).toHaveLength(1);
});

test("without signal photos are kept through a reload, and discarded with the form", async ({
  page,
}) => {
  await desk.open(page);
  const photos = photosOf(page, "bag");
  await cutOff(page);
  await photos.choose(blue);
  await expect(page.getByRole("link", { name: "1 photo to send" })).toBeVisible();
  await page.reload();
  await expect(photos.part.getByText("Photo 1", { exact: true })).toBeVisible();
  await page.unroute(/\/api\/(uploadthing|account)/);
  await comeBack(page);
  await expect(photos.shown).toHaveCount(1);
  await expect(page.getByRole("link", { name: /photo to send/ })).toBeHidden();
  await cutOff(page);
  await photos.choose(green);
  await expect(page.getByRole("link", { name: "1 photo to send" })).toBeVisible();
  await page.getByRole("button", { name: "Clear" }).click();
  await expect(page.getByRole("link", { name: /photo to send/ })).toBeHidden();
});

test("a photo that still waits when its ticket is saved goes to that bag", async ({ page }) => {
  await desk.open(page);
  const photos = photosOf(page, "bag");
  await cutOff(page);
  await photos.choose(blue);
  await expect(photos.part.getByText("Photo 1", { exact: true })).toBeVisible();
  const code = desk.nextCode();
  await saveBag(page, code);
  const left = page.getByRole("region", { name: "Photos on this phone" });
  await expect(left.getByText("1 photo being sent")).toBeVisible();
  await expect(photos.part.getByText("Photo 1", { exact: true })).toBeHidden();
  await page.unroute(/\/api\/(uploadthing|account)/);
  await comeBack(page);
  await expect(left).toBeHidden();
  expect(photosIn(code)).toHaveLength(1);
});

test("another helper's session sends nothing of mine", async ({ page }) => {
  await desk.open(page);
  await cutOff(page);
  await photosOf(page, "bag").choose(blue);
  await expect(page.getByRole("link", { name: "1 photo to send" })).toBeVisible();
  await page.unroute(/\/api\/(uploadthing|account)/);
  const before = server.query<{ n: number }>("select count(*) as n from photos")[0]?.n;
  await page.goto("about:blank");
  await server.signIn(page.context(), "lead");
  const asked = page.waitForResponse(/\/api\/account/);
  await page.goto(`${server.url}/today`);
  await asked;
  await page.waitForTimeout(1500);
  expect(server.query<{ n: number }>("select count(*) as n from photos")[0]?.n).toBe(before);
  await server.signIn(page.context(), "volunteer");
  await page.goto(`${server.url}/today`);
  await expect
    .poll(() => server.query<{ n: number }>("select count(*) as n from photos")[0]?.n)
    .toBe((before ?? 0) + 1);
});

test("photos are dropped on a desk, looked at by keyboard and swipe, and removed by a lead", async ({
  page,
}) => {
  const code = await openBag(page);
  await server.signIn(page.context(), "lead");
  await page.reload();
  const photos = photosOf(page, "bag");
  await photos.choose(blue, green);
  await expect(photos.shown).toHaveCount(2);
  const bytes = (await phonePicture("red.jpg", "#e2553d")).buffer.toString("base64");
  const dragged = await page.evaluateHandle((base64) => {
    const raw = Uint8Array.from(atob(base64), (sign) => sign.charCodeAt(0));
    const transfer = new DataTransfer();
    transfer.items.add(new File([raw], "red.jpg", { type: "image/jpeg" }));
    return transfer;
  }, bytes);
  await photos.part.dispatchEvent("dragover", { dataTransfer: dragged });
  await photos.part.dispatchEvent("drop", { dataTransfer: dragged });
  await expect(photos.shown).toHaveCount(3);

  const first = photos.part.locator("ul button:has(img)").first();
  await first.focus();
  await page.keyboard.press("Enter");
  const large = page.getByRole("dialog", { name: "Photo" });
  await expect(large.getByText("Photo 1 of 3")).toBeVisible();
  await page.keyboard.press("ArrowRight");
  await expect(large.getByText("Photo 2 of 3")).toBeVisible();
  await page.keyboard.press("End");
  await page.keyboard.press("ArrowRight");
  await expect(large.getByText("Photo 3 of 3")).toBeVisible();
  const box = await large.getByRole("img").last().boundingBox();
  if (!box) throw new Error("the large picture is not shown");
  await page.mouse.move(box.x + box.width * 0.3, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width * 0.7, box.y + box.height / 2, { steps: 4 });
  await page.mouse.up();
  await expect(large.getByText("Photo 2 of 3")).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(large).toBeHidden();
  await expect(first).toBeFocused();

  await photos.open(1);
  await large.getByRole("button", { name: "Remove photo" }).click();
  await expect(large.getByRole("button", { name: "Keep it" })).toBeFocused();
  await large.getByRole("button", { name: "Remove", exact: true }).click();
  await expect(large.getByText("Photo 1 of 2")).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(photos.shown).toHaveCount(2);
  expect(photosIn(code)).toHaveLength(2);
  await server.signIn(page.context(), "volunteer");
  await page.reload();
  await photos.open(1);
  await expect(large.getByRole("button", { name: "Close" })).toBeVisible();
  await expect(large.getByRole("button", { name: "Remove photo" })).toBeHidden();
});

test("a lot's chip photo of another colour is pointed out; a new one takes its place", async ({
  page,
}) => {
  await desk.open(page);
  const [scale] = server.query<{ id: string }>("select id from scales limit 1");
  const answer = await page.request.post(`${server.url}/api/weigh-ins`, {
    headers: { origin: server.url },
    data: {
      requestId: newId(),
      code: desk.nextCode(),
      scaleId: scale?.id,
      occurredAt: Date.now(),
      readings: [
        {
          grossMilligrams: 4_000_000,
          containerId: null,
          containerTareMilligrams: 0,
          sackId: null,
          sackTareMilligrams: 0,
        },
      ],
      polymer: "PE-HD",
      kind: "lids",
      colourCode: "blue",
      oneKind: true,
    },
  });
  const receipt = (await answer.json()) as { lot: { number: number } };
  await page.goto(`${server.url}/stock/lots/${receipt.lot.number}`);
  const photos = photosOf(page, "lot");
  await photos.chooseChip(blue);
  await expect(photos.shown).toHaveCount(1);
  await expect(photos.shown).toHaveAttribute("alt", /^Chip of Blue HDPE, 4\.000 kg, /);
  await expect(page.getByText("The chip photo has another colour")).toBeHidden();
  await photos.chooseChip(green);
  await expect(photos.shown).toHaveCount(2);
  await expect(page.getByText("The chip photo has another colour")).toBeVisible();
  await expect(page.getByText(/It differs from Blue by \d+\.\d; over 5/)).toBeVisible();
  await expect(photos.part.getByText("Chip", { exact: true })).toHaveCount(1);
});
