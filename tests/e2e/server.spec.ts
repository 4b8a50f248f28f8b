/** The built program as a whole: it answers, it knows a session, it lets one go, it comes back with its data. */
import { expect, test } from "@playwright/test";
import { startE2eServer, type E2eServer } from "../support/e2e-server";

let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
});
test.afterAll(async () => {
  await server.close();
});

test("says that the database answers, and where its ledger stands", async ({ request }) => {
  const answer = await request.get(`${server.url}/api/health`);
  expect(answer.status()).toBe(200);
  expect(await answer.json()).toMatchObject({ status: "ok", ledger: { entryId: 0 } });
});

test("knows a session that is in the database, and no longer one that was ended", async ({
  page,
  context,
}) => {
  await page.goto(`${server.url}/stock`);
  await expect(page).toHaveURL(/\/sign-in/);

  await server.signIn(context, "volunteer");
  await page.goto(`${server.url}/stock`);
  await expect(page).toHaveURL(/\/stock$/);
  await expect(page.getByRole("heading", { level: 1 })).toBeVisible();

  server.query("update sessions set ended_at = ?", Date.now());
  await page.goto(`${server.url}/stock`);
  await expect(page).toHaveURL(/\/sign-in/);
});

test("is gone when it is ended, and comes back with what it held", async ({ request }) => {
  const points = () => server.query<{ name: string }>("select name from points order by name");
  const before = points();
  expect(before.map((point) => point.name)).toContain("Harbour Road Library");
  await server.stop();
  await expect(request.get(`${server.url}/api/health`)).rejects.toThrow(/ECONNREFUSED|connect/);
  await server.start();
  expect((await request.get(`${server.url}/api/health`)).status()).toBe(200);
  expect(points()).toEqual(before);
});
