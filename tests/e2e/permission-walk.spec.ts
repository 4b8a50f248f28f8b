/** Every page of the built program, as nobody, as each role, and as a removed person, from the one table. */
import { expect, test } from "@playwright/test";
import { ROLES } from "@/lib/core/permissions";
import { startE2eServer, type E2eServer } from "../support/e2e-server";
import { PAGES, sampleAddress } from "../support/permission-table";
import { walkPages } from "../support/walk-pages";

let server: E2eServer;

test.beforeAll(async () => {
  server = await startE2eServer("shed");
});
test.afterAll(async () => {
  await server.close();
});

async function cookieOf(role: (typeof ROLES)[number]): Promise<string> {
  const { cookie } = await server.session(role);
  return `${cookie.name}=${cookie.value}`;
}

test("pages let in whom the table lets in, and nobody else", async () => {
  expect(await walkPages(server.url, "nobody", null)).toEqual([]);
  for (const role of ROLES) {
    expect(await walkPages(server.url, role, await cookieOf(role))).toEqual([]);
  }
});

test("a person is out from the moment of removal, with a cookie that was good", async () => {
  const cookie = await cookieOf("coordinator");
  expect(await walkPages(server.url, "coordinator", cookie)).toEqual([]);
  server.query("update people set removed_at = ? where role = 'coordinator'", Date.now());
  expect(await walkPages(server.url, "removed", cookie)).toEqual([]);
  server.query("update people set removed_at = null where role = 'coordinator'");
});

test("every page has a policy with a fresh nonce, and every script of it carries that nonce", async () => {
  const cookie = await cookieOf("coordinator");
  for (const pattern of Object.keys(PAGES)) {
    const open = () => fetch(server.url + sampleAddress(pattern), { headers: { cookie } });
    const nonceOf = (response: Response) =>
      /'nonce-([^']+)'/.exec(response.headers.get("content-security-policy") ?? "")?.[1] ?? "";
    const [first, second] = [await open(), await open()];
    const nonce = nonceOf(first);
    expect(nonce, pattern).toMatch(/^[\w+/]{24}$/);
    expect(nonceOf(second), pattern).not.toBe(nonce);
    expect(first.headers.get("x-content-type-options")).toBe("nosniff");
    expect(first.headers.get("x-powered-by")).toBeNull();
    const html = await first.text();
    const scripts = [...html.matchAll(/<script\b[^>]*>/g)].map((match) => match[0]);
    expect(scripts.length, pattern).toBeGreaterThan(0);
    for (const script of scripts) expect(script, pattern).toContain(`nonce="${nonce}"`);
    expect(html, pattern).not.toMatch(/<[^>]+\son[a-z]+=/i);
    await second.body?.cancel();
  }
});
