import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { assignPointIn, moveBagIn, restoreBagIn } from "@/lib/bags/commands/move-bag";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { getBagById, listBagsOfOrder } from "@/lib/bags/queries";
import { newId, type BagId, type PointId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { inTransaction } from "@/lib/platform/database";
import { addPoint, closePoint } from "@/lib/points/commands";
import { refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const LATER = instant(NOON + 60_000);

describe("steps that move a bag", () => {
  let scheme: TestScheme;
  let bagId: BagId;
  beforeEach(() => {
    scheme = newScheme();
    const input = { requestId: newId<"tag-order">(), count: 1, pointId: null };
    orderTags(scheme.ctx("coordinator", NOON, input), input);
    const [bag] = listBagsOfOrder(scheme.ctx(), input.requestId);
    if (!bag) throw new Error("no bag");
    bagId = bag.id;
  });
  afterEach(() => scheme.close());

  const point = (name: string): PointId => {
    const input = { requestId: newId(), name, kind: "library" as const };
    return addPoint(scheme.ctx("coordinator", NOON, input), input).id;
  };
  const bag = () => getBagById(scheme.db.reader, bagId);

  it("notes the state and when the bag came into it", () => {
    inTransaction(scheme, (tx) => moveBagIn(tx, bagId, "weighed", LATER));
    expect(bag()).toMatchObject({ state: "weighed", stateSince: LATER, printedAt: NOON });
  });

  it("refuses a state that the present one does not lead to, and rolls the whole step back", () => {
    const refused = refusalOf(() =>
      inTransaction(scheme, (tx) => {
        moveBagIn(tx, bagId, "weighed", LATER);
        moveBagIn(tx, bagId, "out", LATER);
      }),
    );
    expect(refused).toBe("bag-wrong-state");
    expect(bag()).toMatchObject({ state: "printed", stateSince: NOON });
  });

  it("takes a bag back to what it was, its missing point too", () => {
    const mill = point("Mill School");
    inTransaction(scheme, (tx) => {
      assignPointIn(tx, bagId, mill);
      moveBagIn(tx, bagId, "weighed", LATER);
    });
    inTransaction(scheme, (tx) =>
      restoreBagIn(tx, bagId, { state: "printed", since: NOON, pointId: null }),
    );
    expect(bag()).toMatchObject({ state: "printed", stateSince: NOON, pointId: null });
  });

  it("gives a bag without a point its point once", () => {
    const [mill, quay] = [point("Mill School"), point("Quay Café")];
    inTransaction(scheme, (tx) => {
      assignPointIn(tx, bagId, mill);
      assignPointIn(tx, bagId, quay);
    });
    expect(bag()).toMatchObject({ pointId: mill, pointName: "Mill School" });
  });

  it("takes neither a missing nor a closed point", () => {
    const closed = point("Mill School");
    const input = { requestId: newId(), pointId: closed };
    closePoint(scheme.ctx("coordinator", NOON, input), input);
    for (const pointId of [closed, newId<"point">()]) {
      const assign = () => inTransaction(scheme, (tx) => assignPointIn(tx, bagId, pointId));
      expect(refusalOf(assign)).toBe("unknown-point");
    }
    expect(bag()?.pointId).toBeNull();
  });
});
