/**
 * What is done with a lot by hand, each checked against the ledger's sums: split and poured together, "Not sure"
 * identified, opening stock counted with its sheet; and a second reading that is let count.
 */
import { expect, test, type Page } from "@playwright/test";
import { expectAccessible } from "../support/accessible";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { onPan, shown, sortingShed } from "../support/sorting-page";

let server: E2eServer;
let shed: ReturnType<typeof sortingShed>;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
  shed = sortingShed(server);
});
test.afterAll(async () => {
  await server.close();
});
test.afterEach(() => {
  // Whatever was clicked, no gram came from nowhere.
  expect(server.query("select coalesce(sum(grams), 0) as grams from lines")).toEqual([
    { grams: 0 },
  ]);
});

const BLUE_LIDS = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true };

const newestLot = (): number =>
  server.query<{ number: number }>("select max(number) as number from lots")[0]?.number ?? 0;

/** Grams that the book holds in a lot, and why it is closed. */
const lot = (number: number) =>
  server.query<{ grams: number; closedFor: string | null; place: string }>(
    `select coalesce(sum(b.grams), 0) as grams, l.closed_for as closedFor, l.place from lots l
       left join balances b on b.holder_id = l.holder_id where l.number = ?`,
    number,
  )[0];

const went = (page: Page, words: string) => expect(page.getByText(words)).toBeVisible();

test("a container that was there before is entered with its signed sheet", async ({ page }) => {
  await server.signIn(page.context(), "coordinator");
  await page.goto(`${server.url}/counts/opening`);
  // This shed began a month ago; before the first entry that can still be changed.
  await expect(page.getByText("What is found later is a count of its lot.")).toBeVisible();
  server.query("update scheme set first_day = ?", new Date().toISOString().slice(0, 10));
  await page.reload();
  await page.getByLabel("Polymer").selectOption("PP");
  await page.getByLabel("Colour").selectOption("green");
  await page.getByLabel("Kind").selectOption("tubs");
  await page.getByLabel("The scale shows").fill("2.5");
  await page.getByRole("button", { name: "Enter this container" }).click();
  await expect(page.getByText("Opening stock needs a signed count sheet.")).toBeVisible();
  expect(server.query("select 1 from counts where kind = 'opening'")).toEqual([]);
  await page.getByLabel("Signed count sheet").fill("Sheet 3, signed W. Tidewell");
  await expectAccessible(page);
  await page.getByRole("button", { name: "Enter this container" }).click();
  await expect(page.getByText(/^2\.500 kg stand in lot \d+\.$/)).toBeVisible();
  const number = newestLot();
  expect(lot(number)).toMatchObject({ grams: 2500 });
  expect(
    server.query(
      `select c.sheet, c.counted_grams as counted, n.account, n.grams from counts c
         join entries e on e.act_id = c.act_id join lines n on n.entry_id = e.id and n.grams < 0
        where c.kind = 'opening'`,
    ),
  ).toEqual([
    { sheet: "Sheet 3, signed W. Tidewell", counted: 2500, account: "opening", grams: -2500 },
  ]);
  await page.getByRole("link", { name: `Open lot ${number}` }).click();
  await expect(page.getByText("Sheet 3, signed W. Tidewell")).toBeVisible();
});

test.describe("at the desk", () => {
  test.use({ viewport: { width: 1280, height: 800 } });

  test("a lot is split, poured together with its other half, and that is taken back", async ({
    page,
  }) => {
    await server.signIn(page.context(), "lead");
    await shed.weighedBag(page, 3000, BLUE_LIDS);
    const first = newestLot();
    await page.goto(`${server.url}/stock/lots/${first}`);
    await page.getByRole("button", { name: "Split" }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByRole("button", { name: "Put it into a new lot" }).click();
    // Nothing was weighed, so nothing was sent.
    expect(newestLot()).toBe(first);
    await dialog.getByLabel("The scale shows").fill("1.2");
    await dialog.getByLabel("Place of the new lot").fill("Rack B, shelf 2");
    await expectAccessible(page);
    await dialog.getByRole("button", { name: "Put it into a new lot" }).click();
    const second = first + 1;
    await went(page, `1.200 kg went from lot ${first} to lot ${second}, a new lot.`);
    expect(lot(first)).toMatchObject({ grams: 1800, closedFor: null });
    expect(lot(second)).toMatchObject({ grams: 1200, place: "Rack B, shelf 2" });

    await page.getByRole("button", { name: "Pour into another" }).click();
    await expect(dialog.getByRole("button", { name: "Choose a lot first" })).toBeDisabled();
    await expectAccessible(page);
    await dialog.getByRole("button", { name: new RegExp(`^Lot ${second}: Blue HDPE`) }).click();
    await expect(
      dialog.getByRole("radio", { name: "All of it, 1.800 kg by the book" }),
    ).toBeChecked();
    await expectAccessible(page);
    await dialog.getByRole("button", { name: `Pour into lot ${second}` }).click();
    await went(page, `1.800 kg went from lot ${first} to lot ${second}.`);
    expect(lot(first)).toMatchObject({ grams: 0, closedFor: "merged" });
    expect(lot(second)).toMatchObject({ grams: 3000 });

    await page
      .getByRole("region", { name: "What to do with this lot" })
      .getByRole("button", { name: `Undo what went out of lot ${first}` })
      .click();
    await went(page, "It was taken back.");
    // The other half is open for piles of this kind meanwhile, so this one holds its own and stays closed.
    expect(lot(first)).toMatchObject({ grams: 1800, closedFor: "merged" });
    expect(lot(second)).toMatchObject({ grams: 1200, closedFor: null });
  });
});

test("what nobody was sure of is identified on a phone, and moves as an entry", async ({
  page,
}) => {
  await server.signIn(page.context(), "volunteer");
  const code = await shed.weighedBag(page, 1000);
  await shed.post(page, "/api/sortings", {
    codes: [code],
    scaleId: shed.scaleId,
    occurredAt: Date.now(),
    piles: [
      { polymer: "not-sure", kind: "tubs", colourCode: "white", reading: onPan(400) },
      { polymer: "PE-HD", kind: "lids", colourCode: "red", reading: onPan(600) },
    ],
    rejects: [],
  });
  const [unsure] = server.query<{ number: number }>(
    `select l.number from lots l join materials m on m.id = l.material_id join rows r on r.id = m.row_id
      where r.polymer = 'not-sure'`,
  );
  const number = unsure?.number ?? 0;
  await page.goto(`${server.url}/stock/not-sure`);
  await expectAccessible(page);
  await page
    .getByRole("listitem")
    .filter({ hasText: `Lot ${number}` })
    .getByRole("button", { name: "Identify" })
    .click();
  const dialog = page.getByRole("dialog", { name: `What is lot ${number}?` });
  await expect(dialog.getByText("Never burn a piece to find out")).toBeVisible();
  await dialog.getByRole("radio", { name: "PP" }).check();
  await dialog.getByRole("button", { name: "It is PP" }).click();
  await expect(dialog.getByText("Choose how it was found out.")).toBeVisible();
  expect(lot(number)).toMatchObject({ grams: 400 });
  await dialog.getByRole("radio", { name: "Floats or sinks" }).check();
  await expectAccessible(page);
  await dialog.getByRole("button", { name: "It is PP" }).click();
  await expect(page.getByText(/^0\.400 kg went to lot \d+, a new lot\.$/)).toBeVisible();
  const known = newestLot();
  expect(lot(number)).toMatchObject({ grams: 0 });
  expect(lot(known)).toMatchObject({ grams: 400 });
  expect(
    server.query(
      `select e.kind, r.polymer, r.colour_code as colour, m.form from entries e
         join lines n on n.entry_id = e.id and n.grams = 400 join materials m on m.id = n.material_id
         join rows r on r.id = m.row_id where e.kind = 'identify'`,
    ),
  ).toEqual([{ kind: "identify", polymer: "PP", colour: "white", form: "whole" }]);
});

test("a second reading is let count, and the first stays in the history", async ({ page }) => {
  await server.signIn(page.context(), "lead");
  const code = await shed.weighedBag(page, 2000);
  await shed.post(page, "/api/weigh-ins", {
    code,
    scaleId: shed.scaleId,
    occurredAt: Date.now(),
    readings: [onPan(2240)],
  });
  const held = () =>
    server.query<{ grams: number }>(
      "select b.grams from balances b join holders h on h.id = b.holder_id where h.code = ?",
      code,
    );
  expect(held()).toEqual([{ grams: 2000 }]);
  await page.goto(`${server.url}/weigh-ins/for-review`);
  await expect(page.getByText("The second is 0.240 kg more.")).toBeVisible();
  await page.getByRole("button", { name: "Count the second" }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByRole("button", { name: "Count 2.240 kg" }).click();
  expect(held()).toEqual([{ grams: 2000 }]);
  await dialog.getByLabel("Why it is corrected").fill("The first was read with the lid on");
  await expectAccessible(page);
  await dialog.getByRole("button", { name: "Count 2.240 kg" }).click();
  await expect(page.getByText(`Bag ${shown(code)} now counts 2.240 kg.`)).toBeVisible();
  await expect(page.getByText("Nothing to decide")).toBeVisible();
  await expectAccessible(page);
  expect(held()).toEqual([{ grams: 2240 }]);
  expect(
    server.query(
      `select w.net_grams as net, w.state from weigh_ins w join bags b on b.id = w.bag_id
        where b.code = ? order by w.recorded_at, w.id`,
      code,
    ),
  ).toContainEqual({ net: 2000, state: "corrected" });
});
