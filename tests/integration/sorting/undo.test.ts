import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type SortingId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { postAct } from "@/lib/ledger/commands/post";
import { inTransaction } from "@/lib/platform/database";
import { closeSorting } from "@/lib/sorting/commands/close";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { getBagToSort } from "@/lib/sorting/queries/bag-to-sort";
import { listWaitingBags } from "@/lib/sorting/queries/waiting";
import { newShed, sorting, type Shed, type WeighedIn } from "../../support/shed";
import { NOON } from "../../support/scheme";

let shed: Shed;
let bag: WeighedIn;
let id: SortingId;
beforeEach(() => {
  shed = newShed();
  bag = shed.weigh(1000);
  id = closeSorting(
    shed.ctx("volunteer"),
    sorting(shed, bag, { piles: [{ grams: 900 }], rejects: [{ grams: 95 }] }),
  ).sortingId;
});
afterEach(() => shed.close());

const undo = () => ({ requestId: newId(NOON), id });
const read = (sql: string): unknown[] => shed.db.reader.client.prepare(sql).all();

describe("undoing a sorting", () => {
  it("takes everything back and leaves the opened lot, empty", () => {
    expect(undoSorting(shed.ctx("volunteer"), undo())).toEqual({
      sortingId: id,
      codes: [bag.code],
      bagState: "weighed",
    });
    expect(
      read(
        "select h.kind, b.grams from balances b join holders h on h.id = b.holder_id order by h.kind",
      ),
    ).toEqual([
      { kind: "bag", grams: 1000 },
      { kind: "lot", grams: 0 },
      { kind: "reject-bin", grams: 0 },
    ]);
    expect(read("select number, closed_at from lots")).toEqual([{ number: 1, closed_at: null }]);
    expect(
      read(
        "select sum(accepted) as accepted, sum(rejected) as rejected, sum(difference) as difference from totals_month",
      ),
    ).toEqual([{ accepted: 0, rejected: 0, difference: 0 }]);
  });

  it("leaves one audit row and an entry that names what it takes back", () => {
    const before = read("select id from audit_events").length;
    undoSorting(shed.ctx("volunteer"), undo());
    expect(read("select id from audit_events")).toHaveLength(before + 1);
    expect(
      read(
        "select e.kind, e.reverses, (select sum(grams) from lines where entry_id = e.id) as sum from entries e order by id desc limit 1",
      ),
    ).toEqual([{ kind: "reversal", reverses: 2, sum: 0 }]);
  });

  it("puts the bag back into the queue as old as it was, ready to be sorted again", () => {
    undoSorting(shed.ctx("volunteer"), undo());
    expect(listWaitingBags(shed.ctx("volunteer"), {}).bags.map((waiting) => waiting.code)).toEqual([
      bag.code,
    ]);
    const again = closeSorting(shed.ctx("lead"), sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    expect(again.lots).toEqual([{ number: 1, opened: false, grams: 1000, heldGrams: 1000 }]);
  });

  it("answers the same request twice with one effect", () => {
    const input = undo();
    const receipt = undoSorting(shed.ctx("volunteer"), input);
    expect(undoSorting(shed.ctx("volunteer"), input)).toEqual(receipt);
    expect(() => undoSorting(shed.ctx("volunteer"), undo())).toThrow("undone-already");
  });

  it("is refused for others, for a donor, and after ten minutes", () => {
    expect(() => undoSorting(shed.ctx("donor"), undo())).toThrow("forbidden");
    expect(() => undoSorting(shed.ctx("lead"), undo())).toThrow("undo-not-yours");
    const late = instant(NOON + 10 * 60_000 + 1);
    expect(() => undoSorting(shed.ctx("volunteer", late), undo())).toThrow("undo-too-late");
    expect(
      getBagToSort(shed.ctx("volunteer", late), { code: bag.code }).sorted?.undoUntil,
    ).toBeNull();
    expect(getBagToSort(shed.ctx("volunteer"), { code: bag.code }).sorted?.undoUntil).toBe(
      NOON + 10 * 60_000,
    );
  });

  it("is refused once something was taken from what it filled", () => {
    inTransaction(shed, (tx) => {
      const lot = tx.client
        .prepare("select holder_id as holderId, material_id as materialId from lots")
        .get() as {
        holderId: number;
        materialId: number;
      };
      postAct(tx, { now: NOON, doneBy: "x", sentBy: "x", device: null }, [
        {
          kind: "removal",
          occurredAt: NOON,
          subject: "removal:1",
          lines: [
            { account: "lot", ...lot, grams: -100 },
            { account: "disposed", grams: 100 },
          ],
        },
      ]);
    });
    expect(() => undoSorting(shed.ctx("volunteer"), undo())).toThrow("undo-used-since");
  });

  it("is refused for a sorting that is not there", () => {
    expect(() =>
      undoSorting(shed.ctx("volunteer"), { requestId: newId(), id: newId<"sorting">() }),
    ).toThrow("not-found");
  });
});
