import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { RouteHandler } from "@/lib/http/route";
import { listPageFiles, listRouteFiles } from "../../support/app-files";
import { callHandler, serveFrom } from "../../support/call-handler";
import {
  CALLERS,
  EXCEPTIONS,
  HANDLERS,
  mayEnter,
  PAGES,
  sampleAddress,
  type Caller,
} from "../../support/permission-table";
import { newScheme, type TestScheme } from "../../support/scheme";
import { makeSession } from "../../support/session";

const METHODS = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const;
const LEAST_ROUTES = 30;

type Found = { row: string; address: string; handler: RouteHandler };

/** Every exported method of every route.ts. */
async function findHandlers(): Promise<Found[]> {
  const found: Found[] = [];
  for (const { address, file } of listRouteFiles()) {
    const exported = (await import(file)) as Record<string, RouteHandler>;
    for (const method of METHODS) {
      const handler = exported[method];
      if (handler) found.push({ row: `${method} ${address}`, address, handler });
    }
  }
  return found;
}

/** `[code]` in an address, with something in its place. */
function sampleParameters(address: string): Record<string, string> {
  const names = [...address.matchAll(/\[([^\]]+)\]/g)].map((match) => match[1] ?? "");
  return Object.fromEntries(names.map((name) => [name, sampleAddress("[x]")]));
}

let scheme: TestScheme;
let handlers: Found[];
const cookies = new Map<Caller, string>();

beforeAll(async () => {
  scheme = newScheme();
  serveFrom(scheme.db);
  handlers = await findHandlers();
  for (const caller of CALLERS) {
    if (caller === "nobody") continue;
    const person = caller === "removed" ? "coordinator" : caller;
    if (caller === "removed") continue;
    cookies.set(caller, (await makeSession(scheme.db, scheme.people[person])).header);
  }
});
afterAll(() => scheme.close());

describe("the table of permissions", () => {
  it("has a row for every page, and a page for every row", () => {
    const addresses = listPageFiles().map(({ address }) => address);
    expect(addresses).toEqual(Object.keys(PAGES).sort());
  });

  it("has a row for every handler, and a handler for every row", () => {
    const rows = handlers.map(({ row }) => row).sort();
    expect(rows.length).toBeGreaterThan(LEAST_ROUTES);
    expect(rows).toEqual([...Object.keys(HANDLERS), ...Object.keys(EXCEPTIONS)].sort());
  });
});

describe("every handler", () => {
  const walk = async (caller: Caller, cookie: string | undefined) => {
    const wrong: string[] = [];
    for (const { row, address, handler } of handlers) {
      const access = HANDLERS[row];
      if (!access) continue;
      const response = await callHandler(handler, {
        path: sampleAddress(address),
        params: sampleParameters(address),
        ...(cookie ? { cookie } : {}),
      });
      await response.body?.cancel();
      const { status } = response;
      const refused = status === 401 || status === 403;
      const expected = mayEnter(access, caller)
        ? !refused && status < 500
        : status === (caller === "nobody" || caller === "removed" ? 401 : 403);
      if (!expected) wrong.push(`${row} as ${caller}: ${status}`);
    }
    return wrong;
  };

  it("refuses nobody, and lets in each role where the table says so", async () => {
    for (const caller of CALLERS) {
      if (caller === "removed") continue;
      expect(await walk(caller, cookies.get(caller))).toEqual([]);
    }
  });

  it("refuses a person from the moment of removal, though the cookie is still good", async () => {
    const cookie = (await makeSession(scheme.db, scheme.people.coordinator)).header;
    expect(await walk("coordinator", cookie)).toEqual([]);
    scheme.db.writer.client
      .prepare("update people set removed_at = ? where id = ?")
      .run(Date.now(), scheme.people.coordinator);
    expect(await walk("removed", cookie)).toEqual([]);
    scheme.db.writer.client
      .prepare("update people set removed_at = null where id = ?")
      .run(scheme.people.coordinator);
  });

  it("follows a changed role at the next request", async () => {
    const cookie = (await makeSession(scheme.db, scheme.people.lead)).header;
    const change = scheme.db.writer.client.prepare("update people set role = ? where id = ?");
    change.run("donor", scheme.people.lead);
    expect(await walk("donor", cookie)).toEqual([]);
    change.run("lead", scheme.people.lead);
    expect(await walk("lead", cookie)).toEqual([]);
  });
});

describe("answers of reads", () => {
  it("are what the contract says, and hold nothing more", async () => {
    const cookie = cookies.get("coordinator") ?? "";
    let read = 0;
    for (const { row, address, handler } of handlers) {
      if (!row.startsWith("GET ") || EXCEPTIONS[row] || address.includes("[")) continue;
      const response = await callHandler(handler, { path: address, cookie });
      if (response.status !== 200) continue;
      if (!response.headers.get("content-type")?.startsWith("application/json")) continue;
      const answer: unknown = await response.json();
      expect(handler.endpoint.output.parse(answer), row).toEqual(answer);
      read += 1;
    }
    expect(read).toBeGreaterThan(6);
  });
});
