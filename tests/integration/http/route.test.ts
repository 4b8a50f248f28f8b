import { createHash } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { AppError, type ProblemDocument } from "@/lib/core/errors";
import { route, streamRoute } from "@/lib/http/route";
import type { Context } from "@/lib/platform/context";
import { callHandler, serveFrom } from "../../support/call-handler";
import { newScheme, type TestScheme } from "../../support/scheme";
import { makeSession } from "../../support/session";

const echo = endpoint({
  method: "POST",
  path: "/api/echo/{id}",
  summary: "For this test",
  permission: "stock.read",
  input: z.object({ id: z.string(), grams: z.number().int(), name: z.string().min(1, "empty") }),
  output: z.object({ id: z.string(), grams: z.number(), bodyHash: z.string() }),
});
const list = endpoint({
  method: "GET",
  path: "/api/list",
  summary: "For this test",
  permission: null,
  input: z.looseObject({}),
  output: z.looseObject({}),
});

const seen: Context[] = [];
const POST = route(echo, (ctx, input) => {
  seen.push(ctx);
  return { id: input.id, grams: input.grams, bodyHash: ctx.bodyHash };
});
const GET = route(list, (_, input) => input);
const GOOD = { grams: 5, name: "Teal" };

let scheme: TestScheme;
let cookie: string;
beforeAll(async () => {
  scheme = newScheme();
  serveFrom(scheme.db);
  cookie = (await makeSession(scheme.db, scheme.people.volunteer)).header;
});
afterAll(() => scheme.close());

const problemOf = async (response: Response): Promise<ProblemDocument> => {
  expect(response.headers.get("content-type")).toBe("application/problem+json");
  return (await response.json()) as ProblemDocument;
};
const post = (call: Parameters<typeof callHandler>[1] = {}) =>
  callHandler(POST, { params: { id: "7" }, cookie, body: GOOD, ...call });

describe("a request that is in order", () => {
  it("reaches the command with its actor, and the SHA-256 of its raw body", async () => {
    const body = '{ "grams": 5,\n"name": "Teal" }';
    const response = await post({ body });
    expect(response.status).toBe(200);
    const bodyHash = createHash("sha256").update(body).digest("hex");
    expect(await response.json()).toEqual({ id: "7", grams: 5, bodyHash });
    expect(seen.at(-1)?.actor).toMatchObject({
      kind: "person",
      id: scheme.people.volunteer,
      role: "volunteer",
    });
  });

  it("is answered with headers that let nothing run and nothing be kept", async () => {
    const { headers } = await post();
    expect(headers.get("cache-control")).toBe("no-store");
    expect(headers.get("x-content-type-options")).toBe("nosniff");
    expect(headers.get("content-security-policy")).toContain("default-src 'none'");
  });

  it("gets a number of its own, whatever the client calls it", async () => {
    const response = await post({ headers: { "x-request-id": "mine" } });
    expect(response.headers.get("x-request-id")).toMatch(/^[0-9a-f-]{36}$/);
    expect(seen.at(-1)?.requestId).toBe(response.headers.get("x-request-id"));
  });

  it("cannot put another id into the path's place", async () => {
    const response = await post({ body: { ...GOOD, id: "8" } });
    expect(await response.json()).toMatchObject({ id: "7" });
  });

  it("of GET has its query as strings, and a list where a name comes twice", async () => {
    const response = await callHandler(GET, { path: "/api/list?a=1&b=x&b=y&__proto__=z" });
    expect(JSON.parse(await response.text())).toMatchObject({ a: "1", b: ["x", "y"] });
    expect(Object.getPrototypeOf({})).toBe(Object.prototype);
  });
});

describe("who may", () => {
  it("says signed-out without a cookie, and session-ended with one that is over", async () => {
    expect((await problemOf(await post({ cookie: "" }))).code).toBe("signed-out");
    expect((await problemOf(await post({ cookie: "bismar.session=nonsense" }))).code).toBe(
      "session-ended",
    );
    const past = await makeSession(scheme.db, scheme.people.volunteer, {
      expiresAt: Date.now() - 1,
    });
    expect((await problemOf(await post({ cookie: past.header }))).code).toBe("session-ended");
    const foreign = await makeSession(scheme.db, scheme.people.volunteer, {
      secret: "x".repeat(40),
    });
    expect((await problemOf(await post({ cookie: foreign.header }))).code).toBe("session-ended");
  });

  it("ends a session for every copy of its cookie at once", async () => {
    const session = await makeSession(scheme.db, scheme.people.volunteer);
    expect((await post({ cookie: session.header })).status).toBe(200);
    scheme.db.writer.client
      .prepare("update sessions set ended_at = ? where id = ?")
      .run(Date.now(), session.sessionId);
    expect((await problemOf(await post({ cookie: session.header }))).code).toBe("session-ended");
  });

  it("never believes an Authorization header, good or malformed", async () => {
    const { value } = await makeSession(scheme.db, scheme.people.coordinator);
    for (const authorization of [`Bearer ${value}`, "Bearer %E0%A4%A", "Bearer", "Basic x"]) {
      const response = await post({ cookie: "", headers: { authorization } });
      expect((await problemOf(response)).code).toBe("signed-out");
    }
  });

  it("asks for the permission before it looks at the body", async () => {
    const donor = (await makeSession(scheme.db, scheme.people.donor)).header;
    const response = await post({ cookie: donor, body: "not json at all" });
    expect(response.status).toBe(403);
    expect((await problemOf(response)).code).toBe("forbidden");
  });

  it("finds the cookie among others, and is not fooled by a name that ends alike", async () => {
    expect((await post({ cookie: `a=1; ${cookie}; z=2` })).status).toBe(200);
    expect((await post({ cookie: `x${cookie}` })).status).toBe(401);
    expect((await post({ cookie: `x${cookie}; ${cookie}` })).status).toBe(200);
  });
});

describe("where a write may come from", () => {
  const from = async (headers: Record<string, string>, withCookie = true) => {
    const request = new Request("http://localhost:3000/api/echo/7", {
      method: "POST",
      headers: {
        "content-type": "application/json",
        ...(withCookie ? { cookie } : {}),
        ...headers,
      },
      body: JSON.stringify(GOOD),
    });
    return (await POST(request, { params: Promise.resolve({ id: "7" }) })).status;
  };

  it.each([
    ["an own page", { "sec-fetch-site": "same-origin" }, 200],
    ["the address bar", { "sec-fetch-site": "none" }, 200],
    ["another site", { "sec-fetch-site": "cross-site" }, 403],
    ["a sister site", { "sec-fetch-site": "same-site" }, 403],
    [
      "another site that calls itself ours",
      { "sec-fetch-site": "cross-site", origin: "http://localhost:3000" },
      403,
    ],
    ["an own page in an older browser", { origin: "http://localhost:3000" }, 200],
    ["another site in an older browser", { origin: "http://evil.example" }, 403],
    ["a sandboxed frame", { origin: "null" }, 403],
    ["nowhere, with a cookie", {}, 403],
  ] as [string, Record<string, string>, number][])("%s: %s gets %i", async (_, headers, status) => {
    expect(await from(headers)).toBe(status);
  });

  it("lets a request of nobody's through to be told that nobody is signed in", async () => {
    expect(await from({}, false)).toBe(401);
  });
});

describe("a body that is not in order", () => {
  it("must be JSON, and say so", async () => {
    const response = await post({ headers: { "content-type": "text/plain" } });
    expect((await problemOf(response)).code).toBe("not-json");
  });

  it.each(["{", "", "[1]", "7", "null"])("%j is malformed", async (body) => {
    expect((await problemOf(await post({ body }))).code).toBe("malformed-json");
  });

  it("has a limit of 256 KiB, announced or not", async () => {
    const body = JSON.stringify({ ...GOOD, name: "x".repeat(256 * 1024) });
    expect((await problemOf(await post({ body }))).code).toBe("too-large");
    const announced = await post({ body, headers: { "content-length": String(body.length) } });
    expect((await problemOf(announced)).code).toBe("too-large");
    const within = JSON.stringify({ ...GOOD, name: "x".repeat(255 * 1024) });
    expect((await post({ body: within })).status).toBe(200);
  });

  it("is answered field by field, in words", async () => {
    const problem = await problemOf(await post({ body: { grams: "5", name: "" } }));
    expect(problem).toMatchObject({ status: 422, code: "invalid", title: "Invalid" });
    expect(problem.errors).toEqual([
      {
        path: ["grams"],
        code: "invalid_type",
        detail: expect.stringContaining("missing") as string,
      },
      { path: ["name"], code: "empty", detail: "This is needed." },
    ]);
  });
});

describe("a command that refuses or fails", () => {
  const handlerOf = (error: unknown) =>
    route(list, () => {
      throw error;
    });

  it("gives its code, its sentence and its field", async () => {
    const refusal = new AppError("password-too-short", { least: 10 }, ["password"]);
    const response = await callHandler(handlerOf(refusal));
    expect(response.status).toBe(422);
    const detail = expect.stringContaining("at least 10 characters") as string;
    expect(await problemOf(response)).toEqual({
      type: "urn:bismar:problem:password-too-short",
      title: "Password too short",
      status: 422,
      detail,
      code: "password-too-short",
      requestId: response.headers.get("x-request-id"),
      values: { least: 10 },
      errors: [{ path: ["password"], code: "password-too-short", detail }],
    });
  });

  it("says when to try again", async () => {
    const slowed = await callHandler(handlerOf(new AppError("sign-in-slowed", { seconds: 40 })));
    expect([slowed.status, slowed.headers.get("retry-after")]).toEqual([429, "40"]);
    const busy = await callHandler(handlerOf(new AppError("busy")));
    expect([busy.status, busy.headers.get("retry-after")]).toEqual([503, "2"]);
  });

  it("hides the cause of a failure and logs it under the request's number", async () => {
    const logged: string[] = [];
    const spy = vi.spyOn(process.stderr, "write").mockImplementation((line) => {
      logged.push(String(line));
      return true;
    });
    const response = await callHandler(handlerOf(new Error("secret path /etc/x")));
    spy.mockRestore();
    const text = await response.text();
    expect(response.status).toBe(500);
    expect(text).not.toContain("secret path");
    const requestId = response.headers.get("x-request-id") ?? "";
    expect(text).toContain(requestId);
    expect(logged.join("")).toContain("secret path");
    expect(logged.join("")).toContain(requestId);
  });

  it("writes one line of JSON for each request", async () => {
    const lines: string[] = [];
    const spy = vi.spyOn(process.stdout, "write").mockImplementation((line) => {
      lines.push(String(line));
      return true;
    });
    const response = await post();
    spy.mockRestore();
    expect(lines).toHaveLength(1);
    expect(JSON.parse(lines[0] ?? "")).toMatchObject({
      event: "request",
      method: "POST",
      path: "/api/echo/{id}",
      status: 200,
      requestId: response.headers.get("x-request-id"),
      person: scheme.people.volunteer,
    });
  });
});

describe("a stream", () => {
  it("keeps its own content type and gets the program's headers", async () => {
    const stream = streamRoute(
      list,
      () => new Response("a,b\r\n", { headers: { "content-type": "text/csv" } }),
    );
    const response = await callHandler(stream);
    expect(response.headers.get("content-type")).toBe("text/csv");
    expect(response.headers.get("cache-control")).toBe("no-store");
    expect(response.headers.get("x-request-id")).not.toBeNull();
    expect(await response.text()).toBe("a,b\r\n");
  });

  it("is refused like any other", async () => {
    const stream = streamRoute(list, () => {
      throw new AppError("period-invalid");
    });
    expect((await problemOf(await callHandler(stream))).code).toBe("period-invalid");
  });
});
