/**
 * Every page of the program with the demo's eight months in it: axe on a phone, and nothing wider than the screen on a
 * phone and on a desk. In light only: in dark the tokens are others, and every pair of them is checked in
 * tests/reference. A page without a row here fails.
 */
import { expect, test, type Page } from "@playwright/test";
import { overflow, violations } from "../support/accessible";
import { listPageFiles } from "../support/app-files";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

let server: E2eServer;
/** One for each kind of page: to make one anew for each of fifty pages takes a minute. */
let coordinator: Page;
let signedOut: Page;

test.beforeAll(async ({ browser }) => {
  server = await startE2eServer("demo");
  const phone = { viewport: PHONE, reducedMotion: "reduce" } as const;
  signedOut = await (await browser.newContext(phone)).newPage();
  const context = await browser.newContext(phone);
  await server.signIn(context, "coordinator");
  coordinator = await context.newPage();
});
test.afterAll(async () => {
  await coordinator.context().close();
  await signedOut.context().close();
  await server.close();
});

/** A trace of every node that axe looks at would take minutes. */
test.use({ trace: "off" });

const PHONE = { width: 360, height: 740 };
const DESK = { width: 1280, height: 800 };

/**
 * What stands in the place of a page's parameter: SQL whose one row names it. Pages without a parameter have
 * none. A record is the fullest of its kind, because that shows most.
 */
const PARAMETERS: Readonly<Record<string, string>> = {
  "/bags/[code]": "select code from bags where state = 'sorted' order by state_since desc",
  "/b/[code]": "select code from bags where state = 'sorted' order by state_since desc",
  "/runs/[number]":
    "select number from reservations v join runs u on u.id = v.run_id order by number",
  "/runs/[number]/plan": "select number from runs where state = 'planned' order by number desc",
  "/runs/[number]/sheet":
    "select number from reservations v join runs u on u.id = v.run_id order by number",
  "/removals/[id]": "select id from removals where state = 'posted' order by recorded_at desc",
  "/removals/[id]/correct":
    "select id from removals where state = 'posted' order by recorded_at desc",
  "/scales/[scaleId]": "select id from scales order by number",
  "/sorting/[code]": "select code from bags where state = 'weighed' order by state_since desc",
  "/sorting/sessions/[id]": `select session_id from fractions f join sorting_sessions s on s.id = f.session_id
     where s.state = 'closed' group by session_id order by count(*) desc`,
  "/sorting/sessions/[id]/correct": `select session_id from fractions f join sorting_sessions s
     on s.id = f.session_id where s.state = 'closed' group by session_id order by count(*) desc`,
  "/sorting/table/[id]": "select id from sorting_drafts where state = 'open'",
  "/steps/[id]": "select id from steps where state = 'posted' order by recorded_at desc",
  "/steps/[id]/correct": "select id from steps where state = 'posted' order by recorded_at desc",
  "/stock/lots/[number]": `select l.number from lots l join lines n on n.holder_id = l.holder_id
     group by l.id order by count(*) desc`,
  "/tags/[order]/print": "select id from tag_orders order by count desc",
  "/weigh-ins/[id]": "select id from weigh_ins where state = 'posted' order by recorded_at desc",
  "/weigh-ins/[id]/correct":
    "select id from weigh_ins where state = 'posted' order by recorded_at desc",
};

/** Pages for people who are not signed in; the others are opened as coordinator. */
const PUBLIC = ["/", "/b/[code]", "/forgotten", "/points", "/set-password/[token]", "/sign-in"];

/** Pages without a parameter. */
const PLAIN = [
  "/account",
  "/audit",
  "/audit/ledger",
  "/catalogue",
  "/counts",
  "/counts/opening",
  "/palette",
  "/people",
  "/points/manage",
  "/removals",
  "/removals/destinations",
  "/removals/new",
  "/reports",
  "/runs",
  "/runs/new",
  "/scales",
  "/scales/labels",
  "/settings",
  "/sorting",
  "/steps",
  "/steps/new",
  "/stock",
  "/stock/lots",
  "/stock/lots/labels",
  "/stock/not-sure",
  "/tags",
  "/tags/calibration",
  "/today",
  "/weigh-in",
  "/weigh-ins/for-review",
];

const PAGES = [...new Set([...PUBLIC, ...PLAIN, ...Object.keys(PARAMETERS)])].sort();

function addressOf(pattern: string): string {
  const sql = PARAMETERS[pattern];
  if (sql === undefined) return pattern.replace("[token]", "no-such-token");
  const [row] = server.query<Record<string, string | number>>(`${sql} limit 1`);
  if (!row) throw new Error(`The demo has nothing for ${pattern}.`);
  return pattern.replace(/\[\w+\]/, String(Object.values(row)[0]));
}

test("the list of pages is that of the program", () => {
  const shown = listPageFiles()
    .filter(({ file }) => /[\\/]app[\\/]\((?:public|shed)\)[\\/]/.test(file))
    .map(({ address }) => address);
  expect(PAGES).toEqual(shown.sort());
});

for (const pattern of PAGES) {
  test(`${pattern} can be read and used by everybody, on a phone and on a desk`, async () => {
    const page = PUBLIC.includes(pattern) ? signedOut : coordinator;
    await page.setViewportSize(PHONE);
    const response = await page.goto(server.url + addressOf(pattern));
    expect(response?.status()).toBe(200);
    await expect(page.getByRole("heading", { level: 1 })).toHaveCount(1);
    await expect(page.getByRole("status").getByText(/^Loading/)).toHaveCount(0);
    expect.soft(await overflow(page), "on a phone").toBe(0);
    expect.soft(await violations(page)).toEqual([]);
    await page.setViewportSize(DESK);
    expect.soft(await overflow(page), "on a desk").toBe(0);
  });
}
