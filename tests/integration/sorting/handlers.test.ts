import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { GET as balanceCsv } from "@/app/api/reports/balance.csv/route";
import { GET as balanceMetadata } from "@/app/api/reports/balance.csv-metadata.json/route";
import { GET as rejectReasons } from "@/app/api/reject-reasons/route";
import { POST as closeRoute } from "@/app/api/sortings/route";
import { POST as undoRoute } from "@/app/api/sortings/[id]/undo/route";
import { GET as bagRoute } from "@/app/api/sortings/bags/[code]/route";
import { GET as waitingRoute } from "@/app/api/sortings/waiting/route";
import { GET as lotsRoute } from "@/app/api/lots/route";
import { GET as movementsRoute } from "@/app/api/lots/[number]/movements/route";
import { PUT as placeRoute } from "@/app/api/lots/[number]/place/route";
import { GET as stockRoute } from "@/app/api/stock/route";
import { newId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { callHandler, serveFrom } from "../../support/call-handler";
import { makeSession } from "../../support/session";
import { newShed, sorting, type Shed } from "../../support/shed";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
  serveFrom(shed.db);
});
afterEach(() => shed.close());

const cookieOf = async (role: Role): Promise<string> =>
  (await makeSession(shed.db, shed.people[role])).header;

describe("sorting and stock over HTTP", () => {
  it("answers what the contracts say, from a bag that waits to its undo", async () => {
    const cookie = await cookieOf("volunteer");
    const now = Date.now();
    const bag = shed.weigh(1000);

    const waiting = await callHandler(waitingRoute, { cookie });
    expect(waitingRoute.endpoint.output.parse(await waiting.json())).toMatchObject({
      bags: [{ code: bag.code, netGrams: 1000 }],
      waiting: { bags: 1, grams: 1000 },
      next: null,
    });
    const onTable = await callHandler(bagRoute, { cookie, params: { code: bag.code } });
    expect(bagRoute.endpoint.output.parse(await onTable.json())).toMatchObject({ sorted: null });
    const reasons = await callHandler(rejectReasons, { cookie });
    expect(rejectReasons.endpoint.output.parse(await reasons.json())).toMatchObject({
      items: expect.arrayContaining([
        { code: "sharps", name: "Sharps or battery", warning: true },
      ]) as unknown,
    });

    const input = { ...sorting(shed, bag, { piles: [{ grams: 1000 }] }), occurredAt: now };
    const closed = await callHandler(closeRoute, { cookie, body: input });
    expect(closed.status).toBe(200);
    const receipt = closeRoute.endpoint.output.parse(await closed.json()) as { sortingId: string };

    const sorted = await callHandler(bagRoute, { cookie, params: { code: bag.code } });
    expect(bagRoute.endpoint.output.parse(await sorted.json())).toMatchObject({
      state: "sorted",
      sorted: { netGrams: 1000, fractions: [{ netGrams: 1000, pile: { lotNumber: 1 } }] },
    });
    const stock = await callHandler(stockRoute, { cookie, path: "/api/stock?kind=lids" });
    expect(stockRoute.endpoint.output.parse(await stock.json())).toMatchObject({
      cells: [{ polymer: "PE-HD", colourCode: "blue", grams: 1000 }],
    });
    const lots = await callHandler(lotsRoute, { cookie, path: "/api/lots?state=open" });
    expect(lotsRoute.endpoint.output.parse(await lots.json())).toMatchObject({
      lots: [{ number: 1, heldGrams: 1000 }],
    });
    const moved = await callHandler(movementsRoute, { cookie, params: { number: "1" } });
    expect(movementsRoute.endpoint.output.parse(await moved.json())).toMatchObject({
      movements: [{ grams: 1000, bagCode: bag.code }],
    });
    const place = await callHandler(placeRoute, {
      cookie,
      params: { number: "1" },
      body: { requestId: newId(), place: " Rack A " },
    });
    expect(await place.json()).toEqual({ number: 1, place: "Rack A" });

    const undone = await callHandler(undoRoute, {
      cookie,
      params: { id: receipt.sortingId },
      body: { requestId: newId() },
    });
    expect(undone.status).toBe(200);
    expect(undoRoute.endpoint.output.parse(await undone.json())).toMatchObject({
      bagState: "weighed",
    });
  });

  it("says why a sum cannot be saved, with the figures in the sentence and the field", async () => {
    const cookie = await cookieOf("volunteer");
    const bag = shed.weigh(1000);
    const refused = await callHandler(closeRoute, {
      cookie,
      body: sorting(shed, bag, { piles: [{ grams: 900 }] }),
    });
    expect(refused.status).toBe(422);
    expect(await refused.json()).toMatchObject({
      code: "sum-beyond-tolerance",
      detail: expect.stringContaining("0.900 kg of 1.000 kg; 0.100 kg") as unknown,
      errors: [{ path: ["cause"] }],
    });
  });

  it("sends a CSV as a named file that nothing may hold back", async () => {
    const cookie = await cookieOf("coordinator");
    const path = "/api/reports/balance.csv?from=2026-05-01&until=2026-06-01&by=polymer";
    const file = await callHandler(balanceCsv, { cookie, path });
    expect(file.status).toBe(200);
    expect(file.headers.get("content-type")).toBe("text/csv; charset=utf-8; header=present");
    expect(file.headers.get("content-disposition")).toContain(
      "bismar-balance-2026-05-01-2026-05-31.csv",
    );
    expect(file.headers.get("x-accel-buffering")).toBe("no");
    expect((await file.text()).startsWith("polymer,opening_kg,")).toBe(true);
    const described = await callHandler(balanceMetadata, {
      cookie,
      path: path.replace("balance.csv", "balance.csv-metadata.json"),
    });
    expect(described.headers.get("content-type")).toBe("application/csvm+json");
    expect(await described.json()).toMatchObject({ "dc:temporal": "2026-05-01/2026-05-31" });
    const wrong = await callHandler(balanceCsv, {
      cookie,
      path: "/api/reports/balance.csv?from=2026-06-01&until=2026-05-01",
    });
    expect(wrong.status).toBe(422);
  });
});
