/** Promising lots to runs: oldest first, by hand, never more than is free. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { release, reserve } from "@/lib/production/commands/reserve";
import { reserveEndpoint, type Reserved } from "@/lib/production/contract/reservations";
import type { RunReceipt } from "@/lib/production/contract/plans";
import { getRunPage } from "@/lib/production/queries/runs";
import { commandCases, refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { rows } from "../../support/stock-work";
import {
  about,
  DRY_FLAKE,
  HOOKS_GRAMS,
  newWorkshop,
  workshop,
  type Workshop,
} from "../../support/workshop";

const DAY = 24 * 60 * 60 * 1000;

let shop: Workshop;
beforeEach(() => {
  shop = newWorkshop();
});
afterEach(() => shop.close());

type ReserveInput = ReturnType<(typeof reserveEndpoint.input)["parse"]>;

const share = (colourCode: string, thousandths: number) => ({ colourCode, thousandths });
const off = (of: Workshop, run: RunReceipt) =>
  of.db.writer.client.prepare("update runs set state = 'called-off' where id = ?").run(run.id);
const promises = (of: Workshop) =>
  rows(
    of,
    `select l.number as lot, v.grams, v.state from reservations v join lots l on l.id = v.lot_id order by v.seq`,
  );
describe("reserving", () => {
  commandCases<ReserveInput, ReserveInput, Reserved>({
    command: reserve,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = workshop(scheme);
      of.fill(5000, DRY_FLAKE);
      return reserveEndpoint.input.parse(about(of.plan()));
    },
    does: (scheme, answer) => {
      expect(answer).toEqual({
        number: 1,
        picks: [{ number: 1, grams: HOOKS_GRAMS }],
        grams: HOOKS_GRAMS,
        uncovered: [],
      });
      expect(
        rows(scheme, "select promised_grams, grams, state, lapses_at from reservations"),
      ).toEqual([
        {
          promised_grams: HOOKS_GRAMS,
          grams: HOOKS_GRAMS,
          state: "held",
          lapses_at: NOON + 14 * DAY,
        },
      ]);
    },
    wrongState: (scheme) => {
      const of = workshop(scheme);
      of.fill(5000, DRY_FLAKE);
      const run = of.plan();
      off(of, run);
      return { input: about(run), code: "run-not-planned" };
    },
    action: "runs.reserve",
  });

  it("moves nothing in the ledger", () => {
    shop.fill(5000, DRY_FLAKE);
    const before = rows(shop, "select count(*) as n from entries");
    shop.reserve(shop.plan());
    expect(rows(shop, "select count(*) as n from entries")).toEqual(before);
    expect(shop.held(1)).toBe(5000);
  });

  it("takes the oldest lots first, whatever their numbers, and closed ones as well", () => {
    const [late, early] = [shop.fillAnother(700, "blue", 3), shop.fillAnother(900, "blue", 1)];
    const white = shop.fillAnother(2000, "white", 2);
    const run = shop.plan({ shares: [share("blue", 900), share("white", 100)] });
    const { picks, uncovered } = shop.reserve(run);
    // 1058 g of blue, 118 g of white
    expect(picks).toEqual([
      { number: early, grams: 900 },
      { number: late, grams: 158 },
      { number: white, grams: 118 },
    ]);
    expect(uncovered).toEqual([]);
  });

  it("takes what is free, names the rest, and takes the rest when it is there", () => {
    shop.fill(1000, DRY_FLAKE);
    const run = shop.plan({ shares: [share("blue", 900), share("white", 100)] });
    expect(shop.reserve(run)).toMatchObject({
      grams: 1000,
      uncovered: [
        { colourCode: "blue", grams: 58 },
        { colourCode: "white", grams: 118 },
      ],
    });
    expect(refusalOf(() => shop.reserve(run))).toBe("nothing-free");
    const white = shop.fill(500, { ...DRY_FLAKE, colour: "white" });
    expect(shop.reserve(run)).toMatchObject({
      picks: [{ number: white, grams: 118 }],
      uncovered: [{ colourCode: "blue", grams: 58 }],
    });
    shop.fill(58, DRY_FLAKE);
    expect(shop.reserve(run)).toMatchObject({ grams: 58, uncovered: [] });
    expect(refusalOf(() => shop.reserve(run))).toBe("nothing-lacks");
  });

  it("passes what needs a step first, another polymer, another kind", () => {
    shop.fill(5000);
    shop.fill(5000, { ...DRY_FLAKE, wash: "washed" });
    shop.fill(5000, { ...DRY_FLAKE, polymer: "PP" });
    shop.fill(5000, { ...DRY_FLAKE, kind: "bottles" });
    const run = shop.plan();
    expect(refusalOf(() => shop.reserve(run))).toBe("nothing-free");
    const lots = getRunPage(shop.ctx("lead"), 1)?.lots;
    expect(lots?.map(({ number, usable, freeGrams }) => [number, usable, freeGrams])).toEqual([
      [1, false, 5000],
      [2, false, 5000],
    ]);
    const tubs = shop.fill(200, { ...DRY_FLAKE, kind: "tubs" });
    expect(shop.reserve(run).picks).toEqual([{ number: tubs, grams: 200 }]);
  });

  it("presses whole, flake, sheet and offcut, and cuts sheet alone", () => {
    const forms = (["whole", "flake", "sheet", "offcut"] as const).map((form) =>
      shop.fill(100, { form, wash: "as-received" }),
    );
    const press = { pieceId: shop.sheetId, toolId: null, machineId: shop.pressId };
    const pressed = shop.plan({ ...press, wantedPieces: 2 });
    expect(shop.reserve(pressed).picks.map(({ number }) => number)).toEqual(forms.slice(0, 4));
    const input = { requestId: newId(NOON), runId: pressed.id };
    release(shop.ctx("lead", NOON, input), input);
    const cut = shop.plan({ pieceId: shop.markerId, toolId: null, machineId: shop.sawId });
    expect(shop.reserve(cut).picks).toEqual([{ number: forms[2], grams: 100 }]);
  });
});

describe("reserving by hand", () => {
  it("promises the grams of the lots that were chosen, more than the blend lacks as well", () => {
    const [first, second] = [shop.fillAnother(900), shop.fillAnother(900, "blue", 1)];
    const run = shop.plan();
    const chosen = [
      { number: second, grams: 800 },
      { number: first, grams: 500 },
    ];
    expect(shop.reserve(run, chosen)).toEqual({
      number: 1,
      picks: chosen,
      grams: 1300,
      uncovered: [],
    });
    expect(promises(shop)).toEqual([
      { lot: second, grams: 800, state: "held" },
      { lot: first, grams: 500, state: "held" },
    ]);
    expect(refusalOf(() => shop.reserve(run))).toBe("nothing-lacks");
  });

  it("refuses all of it when one lot has less free, and says how much it has", () => {
    const [first, second] = [shop.fillAnother(900), shop.fillAnother(900, "blue", 1)];
    const [run, other] = [shop.plan(), shop.plan()];
    shop.reserve(other, [{ number: second, grams: 300 }]);
    const chosen = [
      { number: first, grams: 100 },
      { number: second, grams: 601 },
    ];
    expect(() => shop.reserve(run, chosen)).toThrow(
      expect.objectContaining({
        code: "lot-not-free",
        detail: { number: second, freeKg: "0.600", wantedKg: "0.601" },
        path: ["lots", 1, "grams"],
      }),
    );
    expect(promises(shop)).toHaveLength(1);
    expect(shop.reserve(run, [{ number: second, grams: 600 }]).grams).toBe(600);
    expect(refusalOf(() => shop.reserve(run, [{ number: second, grams: 1 }]))).toBe("lot-not-free");
  });

  it("refuses lots that this run cannot use, a lot named twice, and a run that is not there", () => {
    const blue = shop.fill(900, DRY_FLAKE);
    const wrong = [
      shop.fill(900),
      shop.fill(900, { ...DRY_FLAKE, colour: "white" }),
      shop.fill(900, { ...DRY_FLAKE, polymer: "PP" }),
      shop.fill(900, { ...DRY_FLAKE, kind: "film" }),
      999,
    ];
    const run = shop.plan();
    for (const number of wrong) {
      expect(refusalOf(() => shop.reserve(run, [{ number, grams: 1 }]))).toBe("lot-not-for-run");
    }
    const twice = { number: blue, grams: 1 };
    expect(refusalOf(() => shop.reserve(run, [twice, twice]))).toBe("lot-not-for-run");
    shop.recount(blue, "empty");
    expect(refusalOf(() => shop.reserve(run, [twice]))).toBe("lot-not-for-run");
    expect(refusalOf(() => shop.reserve({ id: newId(), number: 9 }))).toBe("not-found");
    expect(promises(shop)).toEqual([]);
  });
});
