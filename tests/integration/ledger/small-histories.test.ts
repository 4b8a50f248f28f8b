/** Histories small enough to follow by hand, each posted to the ledger and to the plain model. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { UNSORTED } from "@/lib/ledger/terms";
import { expectSame } from "@/tests/support/ledger-history/comparison";
import {
  bagLine,
  binLine,
  draft,
  lotLine,
  runLine,
  type Line,
} from "@/tests/support/ledger-history/lines";
import { Picks } from "@/tests/support/ledger-history/picks";
import { expectRowsClose } from "@/tests/support/ledger-history/report-rows";
import {
  closeMonth,
  held,
  newHolder,
  newWorld,
  post,
  takeBack,
  type Lot,
  type World,
} from "@/tests/support/ledger-history/world";
import { newScheme } from "@/tests/support/scheme";

let world: World;
beforeEach(() => {
  world = newWorld(newScheme());
});
afterEach(() => world.scheme.close());

const none = new Picks([]);
const lotOf = (colour: "blue" | "red" | "regrind"): Lot =>
  world.lots[{ blue: 4, red: 6, regrind: 8 }[colour]]!;

function entry(kind: Parameters<typeof draft>[0], lines: Line[], day = "2026-05-06") {
  return draft(kind, none, lines, day);
}

/** One bag of a point, straight into a lot; gives its origin. */
function bagInto(lot: Lot, point: number, grams: number): number {
  const bag = newHolder(world, "bag", `BAG${world.acts.length}`);
  const originNo = world.origins[point]!.no;
  post(world, [
    entry("weigh-in", [
      { account: "source", originNo, materialId: UNSORTED, grams: -grams },
      bagLine(bag, grams),
    ]),
    entry("sort", [bagLine(bag, -grams), lotLine(lot, grams)]),
  ]);
  return originNo;
}

const piecesLine = (batch: number, { material }: Lot, grams: number): Line => ({
  account: "pieces",
  holderId: batch,
  materialId: material,
  grams,
});

function allAgree(): void {
  expectSame(world);
  expectRowsClose(world, "2026-01-01", "2027-01-01");
}

describe("small histories", () => {
  it("taking out of two colours in one entry: a run keeps the rows it drew", () => {
    const [blue, red] = [lotOf("blue"), lotOf("red")];
    bagInto(blue, 0, 100);
    bagInto(red, 1, 100);
    const run = newHolder(world, "run", "RUN");
    post(world, [
      entry("draw", [
        lotLine(blue, -50),
        lotLine(red, -50),
        runLine(run, blue.material, 50),
        runLine(run, red.material, 50),
      ]),
    ]);
    allAgree();
  });

  it("pieces of two colours stand in the rows they left", () => {
    const [blue, red] = [lotOf("blue"), lotOf("red")];
    bagInto(blue, 0, 60);
    bagInto(red, 1, 40);
    const run = newHolder(world, "run", "RUN");
    const batch = newHolder(world, "batch", "BATCH");
    post(world, [
      entry("draw", [lotLine(blue, -60), runLine(run, blue.material, 60)]),
      entry("draw", [lotLine(red, -40), runLine(run, red.material, 40)]),
    ]);
    post(world, [
      entry("finish", [
        runLine(run, blue.material, -60),
        runLine(run, red.material, -40),
        piecesLine(batch, blue, 90),
        { account: "loss", cause: "cuttings", grams: 10 },
      ]),
    ]);
    allAgree();
  });

  it("an undo that had to settle cannot be taken back either", () => {
    const lot = lotOf("blue");
    bagInto(lot, 0, 100);
    const [act] = world.acts;
    post(world, [entry("count", [lotLine(lot, -30), { account: "difference", grams: 30 }])]);
    takeBack(world, act!, []);
    expect(world.book.entries.at(-1)).toMatchObject({ kind: "settling" });
    allAgree();
    takeBack(world, world.acts.at(-1)!, []);
    allAgree();
  });

  it("a correction of a correction, its lot being empty by now, settles anew", () => {
    const lot = lotOf("blue");
    const point = bagInto(lot, 0, 100);
    const bag = newHolder(world, "bag", "BAG0");
    post(world, [entry("move", [lotLine(lot, -100), binLine(world, 100)])]);
    const again = (grams: number): Parameters<typeof takeBack>[2] => [
      entry("weigh-in", [
        { account: "source", originNo: point, materialId: UNSORTED, grams: -grams },
        bagLine(bag, grams),
      ]),
      entry("sort", [bagLine(bag, -grams), lotLine(lot, grams)]),
    ];
    takeBack(world, world.acts[0]!, again(70));
    expect(held(world, lot.holder, lot.material)).toBe(0);
    allAgree();
    takeBack(world, world.acts.at(-1)!, again(130));
    expect(held(world, lot.holder, lot.material)).toBe(30);
    allAgree();
  });

  it("only the point was wrong: the parts that are gone come from the lot's others, as re-sorted", () => {
    const lot = lotOf("blue");
    bagInto(lot, 0, 100);
    bagInto(lot, 1, 100);
    post(world, [entry("removal", [lotLine(lot, -150), { account: "disposed", grams: 150 }])]);
    const bag = newHolder(world, "bag", "BAG0");
    const right = world.origins[2]!.no;
    takeBack(world, world.acts[0]!, [
      entry("weigh-in", [
        { account: "source", originNo: right, materialId: UNSORTED, grams: -100 },
        bagLine(bag, 100),
      ]),
      entry("sort", [bagLine(bag, -100), lotLine(lot, 100)]),
    ]);
    expect(held(world, lot.holder, lot.material)).toBe(50);
    allAgree();
  });

  it("a late correction of a closed month is booked on the first open day", () => {
    const lot = lotOf("blue");
    bagInto(lot, 0, 100);
    post(world, [
      entry("count", [lotLine(lot, -30), { account: "difference", grams: 30 }], "2026-01-20"),
    ]);
    closeMonth(world);
    closeMonth(world);
    takeBack(world, world.acts.at(-1)!, [
      entry("count", [lotLine(lot, -20), { account: "difference", grams: 20 }], "2026-01-20"),
    ]);
    expect(world.book.entries.at(-1)).toMatchObject({ trueDay: "2026-01-20", day: "2026-03-01" });
    allAgree();
  });
});
