import { describe, expect, it } from "vitest";
import * as z from "zod";
import { endpointUrl, fillPath } from "@/components/forms/fetch-endpoint";
import {
  fieldErrorsOf,
  ProblemError,
  readAnswer,
  UnreachableError,
} from "@/components/forms/problem-document";
import { endpoint } from "@/lib/core/endpoint";
import type { ProblemDocument } from "@/lib/core/errors";

const json = (body: unknown, status = 200, type = "application/json") =>
  new Response(JSON.stringify(body), { status, headers: { "content-type": type } });

const PROBLEM: ProblemDocument = {
  type: "urn:bismar:problem:not-a-step",
  title: "Not a step",
  status: 422,
  detail: "The scale shows steps of 5 g.",
  code: "not-a-step",
  requestId: "r",
  values: {},
  errors: [
    { path: ["readings", 0, "grossMilligrams"], code: "not-a-step", detail: "First." },
    { path: ["readings", 0, "grossMilligrams"], code: "other", detail: "Second." },
  ],
};

describe("readAnswer", () => {
  it("gives the body of an answer", async () => {
    expect(await readAnswer(json({ kind: "posted" }))).toEqual({ kind: "posted" });
  });

  it("throws a refusal with its problem document", async () => {
    const refusal = await readAnswer(json(PROBLEM, 422, "application/problem+json")).catch(
      (error: unknown) => error,
    );
    expect(refusal).toBeInstanceOf(ProblemError);
    expect((refusal as ProblemError).problem).toEqual(PROBLEM);
  });

  it("makes an internal problem of a refusal that is none of ours", async () => {
    const refusal = await readAnswer(json({ error: "x" }, 500)).catch((error: unknown) => error);
    expect((refusal as ProblemError).problem).toMatchObject({ code: "internal", status: 500 });
  });

  it.each([
    [
      "a network's sign-in page",
      new Response("<html>", { headers: { "content-type": "text/html" } }),
    ],
    ["a proxy's error page", new Response("Bad gateway", { status: 502 })],
    [
      "half an answer",
      new Response('{"kind":', { headers: { "content-type": "application/json" } }),
    ],
  ])("takes %s for no answer at all, never for a receipt", async (_, response) => {
    await expect(readAnswer(response)).rejects.toBeInstanceOf(UnreachableError);
  });
});

describe("fieldErrorsOf", () => {
  it("keeps the first sentence of each field", () => {
    expect(fieldErrorsOf(PROBLEM)).toEqual({ "readings.0.grossMilligrams": "First." });
    expect(fieldErrorsOf(null)).toEqual({});
  });
});

describe("addresses", () => {
  const lots = endpoint({
    method: "GET",
    path: "/api/lots/{number}/movements",
    summary: "",
    permission: null,
    input: z.object({
      number: z.string(),
      kinds: z.array(z.string()).optional(),
      after: z.string().optional(),
    }),
    output: z.object({}),
  });

  it("fill the path and put the rest into the query string", () => {
    expect(endpointUrl(lots, { number: "1 2", kinds: ["a", "b"], after: undefined })).toBe(
      "/api/lots/1%202/movements?kinds=a&kinds=b",
    );
  });

  it("leave the path's values out of what is sent, and miss none", () => {
    expect(fillPath("/api/weigh-ins/{id}/undo", { id: "x", requestId: "r" })).toEqual({
      path: "/api/weigh-ins/x/undo",
      rest: { requestId: "r" },
    });
    expect(() => fillPath("/api/lots/{number}", {})).toThrow(TypeError);
  });
});
