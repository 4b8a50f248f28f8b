import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { GET as checkWeightsRoute } from "@/app/api/check-weights/route";
import { GET as destinationsRoute } from "@/app/api/destinations/route";
import { POST as correctRoute } from "@/app/api/removals/[id]/correct/route";
import { POST as correctReceiptRoute } from "@/app/api/removals/[id]/receipt/correct/route";
import { POST as receiptRoute } from "@/app/api/removals/[id]/receipt/route";
import { POST as undoReceiptRoute } from "@/app/api/removals/[id]/receipt/undo/route";
import { POST as undoRoute } from "@/app/api/removals/[id]/undo/route";
import { GET as lotRoute } from "@/app/api/removals/lots/[number]/route";
import { POST as takeRoute } from "@/app/api/removals/route";
import { POST as checkRoute } from "@/app/api/scales/[scaleId]/checks/route";
import { POST as clearRoute } from "@/app/api/scales/[scaleId]/clearances/route";
import { GET as scalesTodayRoute } from "@/app/api/scales/today/route";
import { newId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import type { RouteHandler } from "@/lib/http/route";
import { addCheckWeight } from "@/lib/scales/commands/check-weights";
import { callHandler, serveFrom } from "../../support/call-handler";
import { removalDesk, type RemovalDesk } from "../../support/removal-desk";
import { newScheme, type TestScheme } from "../../support/scheme";
import { makeSession } from "../../support/session";

let scheme: TestScheme;
let desk: RemovalDesk;
beforeEach(() => {
  scheme = newScheme();
  desk = removalDesk(scheme);
  serveFrom(scheme.db);
});
afterEach(() => scheme.close());

const cookieOf = async (role: Role): Promise<string> =>
  (await makeSession(scheme.db, scheme.people[role])).header;

type Call = Omit<NonNullable<Parameters<typeof callHandler>[1]>, "cookie">;

/** The answer, as the handler's own contract reads it. */
async function answerOf(handler: RouteHandler, cookie: string, call: Call): Promise<unknown> {
  const response = await callHandler(handler, { cookie, ...call });
  const body: unknown = await response.json();
  expect(response.status, JSON.stringify(body)).toBe(200);
  return handler.endpoint.output.parse(body);
}

describe("removals over HTTP", () => {
  it("answer what the contracts say, from a lot that is looked up to a correction", async () => {
    const cookie = await cookieOf("lead");
    const call = (handler: RouteHandler, more: Call) => answerOf(handler, cookie, more);
    expect(await call(destinationsRoute, {})).toMatchObject({
      items: [
        { name: "Marsh Transfer Station" },
        { name: "Quay Recycling", wasteCode: "19 12 04" },
      ],
    });
    expect(await call(lotRoute, { params: { number: "1" } })).toMatchObject({ heldGrams: 3000 });

    const today = new Date().toISOString().slice(0, 10);
    const { requestId: id, ...sent } = desk.input({ grams: 1000, lot: 1, day: today });
    expect(await call(takeRoute, { body: { ...sent, requestId: id } })).toMatchObject({
      id,
      source: "stock",
      grams: 1000,
    });
    const params = { id };
    const receipt = { number: "R 1", day: today, receivedGrams: 990 };
    const receiptId = newId();
    expect(
      await call(receiptRoute, { params, body: { requestId: receiptId, ...receipt } }),
    ).toMatchObject({ receiptId, provenGrams: 1000 });
    const again = newId();
    expect(
      await call(correctReceiptRoute, {
        params,
        body: { requestId: again, receiptId, reason: "Misread", replacement: receipt },
      }),
    ).toEqual({ receiptId, replacementId: again });
    expect(
      await call(undoReceiptRoute, { params, body: { requestId: newId(), receiptId: again } }),
    ).toMatchObject({ removalId: id });
    const replacementId = newId();
    const { confirmedAbove: _, ...replacement } = sent;
    expect(
      await call(correctRoute, {
        params,
        body: { requestId: replacementId, reason: "Another note", replacement },
      }),
    ).toMatchObject({ replacementId, receipt: "none" });

    const other = newId();
    await call(takeRoute, { body: { ...sent, requestId: other } });
    expect(
      await call(undoRoute, { params: { id: other }, body: { requestId: newId() } }),
    ).toMatchObject({ state: "undone" });
  });

  it("say where it went wrong, in a sentence and at its field", async () => {
    const cookie = await cookieOf("lead");
    const today = new Date().toISOString().slice(0, 10);
    const response = await callHandler(takeRoute, {
      cookie,
      body: desk.input({ grams: 2500, day: today }),
    });
    expect(response.status).toBe(422);
    expect(await response.json()).toMatchObject({
      code: "removal-above-book",
      detail:
        "The book has 2.000 kg in the reject bin, 2.500 kg are taken away: 0.500 kg more than can be explained. Nothing was saved; weigh it again, and if it stays so, confirm it.",
      errors: [{ path: ["confirmedAbove"] }],
    });
  });
});

describe("scales over HTTP", () => {
  it("answer what the contracts say, from a check weight to a clearance", async () => {
    const weight = addCheckWeight(scheme.ctx("coordinator"), {
      requestId: newId(),
      name: "Brass",
      massMilligrams: 2_000_000,
      evidence: "Certificate 118",
    });
    const volunteer = await cookieOf("volunteer");
    expect(await answerOf(checkWeightsRoute, volunteer, {})).toMatchObject({ items: [weight] });
    const params = { scaleId: desk.scale.id };
    expect(
      await answerOf(checkRoute, volunteer, {
        params,
        body: { requestId: newId(), checkWeightId: weight.id, readingMilligrams: 2_010_000 },
      }),
    ).toMatchObject({ passed: false, state: "failed-once" });
    expect(await answerOf(scalesTodayRoute, volunteer, {})).toMatchObject({
      items: [{ name: "Floor scale", state: "failed-once" }],
    });
    const day = new Date().toISOString().slice(0, 10);
    expect(
      await answerOf(clearRoute, await cookieOf("lead"), {
        params,
        body: { requestId: newId(), day, note: "Levelled it" },
      }),
    ).toMatchObject({ state: "cleared" });
  });
});
