import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { ENDPOINTS } from "@/lib/http/endpoints";
import type { RouteHandler } from "@/lib/http/route";
import { listRouteFiles } from "../../support/app-files";
import { callHandler, serveFrom } from "../../support/call-handler";
import { EXCEPTIONS } from "../../support/permission-table";
import { newScheme, type TestScheme } from "../../support/scheme";

const METHODS = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const;

let scheme: TestScheme;
beforeAll(() => {
  scheme = newScheme();
  serveFrom(scheme.db);
});
afterAll(() => scheme.close());

/** "/api/bags/[code]" as a contract writes it. */
const contractPath = (address: string): string => address.replace(/\[([^\]]+)\]/g, "{$1}");

type Described = {
  openapi: string;
  paths: Record<string, Record<string, { parameters: { name: string; in: string }[] }>>;
};

async function served(): Promise<{ name: string; handler: RouteHandler; exportedAs: string }[]> {
  const list = [];
  for (const { address, file } of listRouteFiles()) {
    const exported = (await import(file)) as Record<string, RouteHandler>;
    for (const method of METHODS) {
      const handler = exported[method];
      if (!handler || EXCEPTIONS[`${method} ${address}`]) continue;
      list.push({ name: `${method} ${contractPath(address)}`, handler, exportedAs: method });
    }
  }
  return list;
}

describe("GET /api/openapi.json", () => {
  it("lists every handler under app/api, and nothing that is not there", async () => {
    const { GET } = await import("@/app/api/openapi.json/route");
    const document = (await (await callHandler(GET)).json()) as Described;
    expect(document.openapi).toBe("3.1.0");
    const described = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method.toUpperCase()} ${path}`),
    );
    const handlers = await served();
    expect(described.sort()).toEqual(handlers.map(({ name }) => name).sort());
    expect(described.length).toBeGreaterThan(30);
  });

  it("describes each with its parameters in path", async () => {
    const { GET } = await import("@/app/api/openapi.json/route");
    const { paths } = (await (await callHandler(GET)).json()) as Described;
    for (const [path, methods] of Object.entries(paths)) {
      const wanted = [...path.matchAll(/\{([^}]+)\}/g)].map((match) => match[1]);
      for (const operation of Object.values(methods)) {
        const named = operation.parameters
          .filter((one) => one.in === "path")
          .map((one) => one.name);
        expect(named, path).toEqual(wanted);
      }
    }
  });

  it("serves each endpoint of the contracts in its own file, under its own method", async () => {
    const handlers = await served();
    for (const { name, handler, exportedAs } of handlers) {
      expect(ENDPOINTS, name).toContain(handler.endpoint);
      expect(`${exportedAs} ${handler.endpoint.path}`).toBe(name);
      expect(handler.endpoint.method).toBe(exportedAs);
    }
    expect(new Set(handlers.map(({ handler }) => handler.endpoint)).size).toBe(ENDPOINTS.length);
  });
});

describe("GET /api/health", () => {
  it("says that the database answers, and the ledger's head", async () => {
    const { GET } = await import("@/app/api/health/route");
    const response = await callHandler(GET);
    expect(response.status).toBe(200);
    expect(await response.json()).toEqual({ status: "ok", ledger: { entryId: 0, hash: "" } });
  });

  it("answers 503 when the database does not", async () => {
    const { GET } = await import("@/app/api/health/route");
    const broken = newScheme();
    broken.db.reader.client.close();
    serveFrom(broken.db);
    const response = await callHandler(GET);
    serveFrom(scheme.db);
    broken.close();
    expect(response.status).toBe(503);
    expect(response.headers.get("retry-after")).toBe("2");
    expect(await response.json()).toMatchObject({ code: "database-unavailable", status: 503 });
  });
});
