/** Several bags on one table, put aside and taken up, and sessions that are corrected. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError, type ErrorCode } from "@/lib/core/errors";
import { newId, type SortingId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { heldBy } from "@/lib/ledger/queries/entries";
import { UNSORTED } from "@/lib/ledger/terms";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { closeSorting } from "@/lib/sorting/commands/close";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { giveUpDraft, openDraft, saveDraft } from "@/lib/sorting/commands/drafts";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { listDrafts } from "@/lib/sorting/queries/drafts";
import { listWaitingBags } from "@/lib/sorting/queries/waiting";
import { newShed, sorting, type Shed, type WeighedIn } from "../../support/shed";
import { NOON } from "../../support/scheme";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => {
  expect(verifyLedger(shed.db.reader)).toMatchObject({ ok: true });
  shed.close();
});

const rows = <T>(sql: string, ...values: unknown[]): T[] =>
  shed.db.reader.client.prepare(sql).all(...values) as T[];
const LATER = instant(NOON + 30 * 3_600_000);

function refusal(work: () => unknown): {
  code: ErrorCode;
  path: AppError["path"];
  detail: AppError["detail"];
} {
  try {
    work();
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("it was not refused");
}

const close = (
  input: Parameters<typeof closeSorting>[1],
  who: "volunteer" | "lead" = "volunteer",
) => closeSorting(shed.ctx(who, NOON, input), input);
const bagStates = () =>
  rows<{ state: string }>("select state from bags order by id").map(({ state }) => state);

describe("several bags on one table", () => {
  it("share origins by net weight, whole to the gram", () => {
    const bags = [shed.weigh(2160, { point: 0 }), shed.weigh(1000, { point: 1 })];
    const receipt = close(
      sorting(shed, bags, { piles: [{ grams: 2500 }], rejects: [{ grams: 660 }] }),
    );
    expect(receipt).toMatchObject({
      netGrams: 3160,
      acceptedGrams: 2500,
      rejectedGrams: 660,
      differenceGrams: 0,
    });
    expect(receipt.codes.sort()).toEqual(bags.map(({ code }) => code).sort());
    expect(bagStates()).toEqual(["sorted", "sorted"]);
    // 2500 of 3160 by 2160 : 1000, the largest remainder first: 1708.86 and 791.14.
    const parts = rows(
      `select p.grams from parts p join lots l on l.holder_id = p.holder_id where p.dim = 'O' order by p.grams desc`,
    );
    expect(parts).toEqual([{ grams: 1709 }, { grams: 791 }]);
    expect(rows("select count(*) as n from sorting_bags where live = 1")).toEqual([{ n: 2 }]);
  });

  it("are undone as one", () => {
    const bags = [shed.weigh(2160), shed.weigh(1000)];
    const { sortingId } = close(sorting(shed, bags, { piles: [{ grams: 3160 }] }));
    const input = { requestId: newId(NOON), id: sortingId };
    undoSorting(shed.ctx("volunteer", NOON, input), input);
    expect(bagStates()).toEqual(["weighed", "weighed"]);
    expect(
      rows("select sum(grams) as grams from balances where material_id = ?", UNSORTED),
    ).toEqual([{ grams: 3160 }]);
  });

  it("count once when one bag is scanned by two tags", () => {
    const bag = shed.weigh(1000);
    const input = sorting(shed, [bag, bag], { piles: [{ grams: 1000 }] });
    expect(close(input).netGrams).toBe(1000);
  });

  it("go to the lot that was chosen, or a new one", () => {
    const first = close(sorting(shed, shed.weigh(1000), { piles: [{ grams: 1000 }] }));
    const second = close(
      sorting(shed, shed.weigh(1000), {
        piles: [
          { grams: 400, lot: "new" },
          { grams: 600, lot: 1 },
        ],
      }),
    );
    expect(first.lots).toMatchObject([{ number: 1, heldGrams: 1000 }]);
    expect(second.lots).toMatchObject([
      { number: 2, opened: true, heldGrams: 400 },
      { number: 1, opened: false, heldGrams: 1600 },
    ]);
    const other = sorting(shed, shed.weigh(500), {
      piles: [{ grams: 500, colour: "white", lot: 1 }],
    });
    expect(refusal(() => close(other))).toMatchObject({
      code: "lot-other-material",
      path: ["piles", 0, "lot"],
    });
    shed.db.writer.client
      .prepare("update lots set closed_at = ?, closed_for = 'full' where number = 2")
      .run(NOON);
    const late = sorting(shed, shed.weigh(500), { piles: [{ grams: 500, lot: 2 }] });
    expect(refusal(() => close(late))).toMatchObject({ code: "lot-closed", detail: { lot: 2 } });
  });
});

type Saving = {
  version?: number;
  content?: string;
  who?: "volunteer" | "lead";
  draft?: SortingId;
};

describe("a session that is put aside", () => {
  const id = newId<"sorting">(NOON);
  const save = (
    bags: readonly WeighedIn[],
    { version = 0, content = "{}", who = "volunteer", draft = id }: Saving = {},
  ) =>
    saveDraft(shed.ctx(who), { id: draft, version, codes: bags.map(({ code }) => code), content });

  it("keeps what was typed, and who changed it", () => {
    const bags = [shed.weigh(800), shed.weigh(500)];
    expect(save(bags)).toMatchObject({ version: 1, others: [] });
    expect(save(bags, { version: 1, content: '{"piles":1}' })).toMatchObject({ version: 2 });
    // The same sent again, because the answer was lost, changes nothing.
    expect(save(bags, { version: 1, content: '{"piles":1}' })).toMatchObject({ version: 2 });
    expect(listDrafts(shed.ctx("lead")).drafts).toMatchObject([{ id, netGrams: 1300, version: 2 }]);
    expect(openDraft(shed.ctx("lead"), { id })).toMatchObject({
      content: '{"piles":1}',
      others: [{ id: shed.people.volunteer }],
    });
    // The other is no longer there a minute later.
    expect(openDraft(shed.ctx("lead", instant(NOON + 61_000)), { id }).others).toEqual([]);
  });

  it("refuses the second of two who changed it, and says who was first", () => {
    const bag = shed.weigh(800);
    save([bag]);
    save([bag], { version: 1, content: "mine", who: "lead" });
    const second = refusal(() => save([bag], { version: 1, content: "yours" }));
    expect(second).toMatchObject({ code: "draft-overtaken" });
    expect(second.detail.who).toBe(
      rows<{ name: string }>("select name from people where id = ?", shed.people.lead)[0]?.name,
    );
  });

  it("keeps its bags from another table until it is saved or given up", () => {
    const bag = shed.weigh(800);
    save([bag]);
    expect(refusal(() => save([bag], { draft: newId(NOON), who: "lead" }))).toMatchObject({
      code: "bag-in-other-session",
      path: ["codes", 0],
    });
    const elsewhere = sorting(shed, bag, { piles: [{ grams: 800 }] });
    expect(refusal(() => close(elsewhere, "lead")).code).toBe("bag-in-other-session");
    giveUpDraft(shed.ctx("volunteer"), { id, version: 1 });
    expect(close(elsewhere, "lead").netGrams).toBe(800);
    expect(refusal(() => save([bag], { version: 1 })).code).toBe("draft-over");
  });

  it("is saved by whoever is first; the second is told", () => {
    const bag = shed.weigh(800);
    save([bag]);
    const input = { ...sorting(shed, bag, { piles: [{ grams: 800 }] }), requestId: id };
    close(input);
    expect(listDrafts(shed.ctx("volunteer")).drafts).toEqual([]);
    expect(refusal(() => openDraft(shed.ctx("lead"), { id })).code).toBe("draft-over");
    const second = sorting(shed, bag, { piles: [{ grams: 790 }] });
    expect(refusal(() => close(second, "lead")).code).toBe("bag-already-sorted");
  });

  it("lets a bag that was taken off the table go to another", () => {
    const [one, two] = [shed.weigh(800), shed.weigh(500)];
    save([one, two]);
    save([one], { version: 1 });
    expect(save([two], { draft: newId(NOON), who: "lead" }).codes).toEqual([two.code]);
  });
});

describe("correcting a session", () => {
  const correct = (
    sortingId: SortingId,
    replacement: Parameters<typeof correctSorting>[1]["replacement"],
    who: "lead" | "volunteer" = "lead",
  ) => {
    const input = {
      requestId: newId(NOON),
      id: sortingId,
      reason: "Two piles were swapped",
      replacement,
    };
    return correctSorting(shed.ctx(who, LATER, input), input);
  };
  const tableOf = (bag: WeighedIn | readonly WeighedIn[], of: Parameters<typeof sorting>[2]) => {
    const { requestId: _id, codes: _codes, ...table } = sorting(shed, bag, of);
    return table;
  };

  it("is one act that puts the piles where they should have gone", () => {
    const bags = [shed.weigh(2160), shed.weigh(1000)];
    const { sortingId } = close(sorting(shed, bags, { piles: [{ grams: 3160, colour: "blue" }] }));
    const done = correct(
      sortingId,
      tableOf(bags, { piles: [{ grams: 3000, colour: "white" }], rejects: [{ grams: 160 }] }),
    );
    expect(done).toMatchObject({
      id: sortingId,
      later: { count: 0 },
      receipt: { acceptedGrams: 3000, rejectedGrams: 160 },
    });
    expect(
      rows(
        "select l.number, b.grams from lots l join balances b on b.holder_id = l.holder_id order by 1",
      ),
    ).toEqual([
      { number: 1, grams: 0 },
      { number: 2, grams: 3000 },
    ]);
    expect(rows("select state, corrects from sorting_sessions order by recorded_at")).toEqual([
      { state: "corrected", corrects: null },
      { state: "closed", corrects: sortingId },
    ]);
    expect(refusal(() => correct(sortingId, null)).code).toBe("corrected-already");
    const undo = { requestId: newId(NOON), id: done.receipt?.sortingId as SortingId };
    expect(refusal(() => undoSorting(shed.ctx("lead", LATER, undo), undo)).code).toBe(
      "undo-of-correction",
    );
  });

  it("keeps its own lot though that closed since, and no other closed one", () => {
    const bag = shed.weigh(1000);
    const { sortingId } = close(sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    close(sorting(shed, shed.weigh(500), { piles: [{ grams: 500, lot: "new" }] }));
    shed.db.writer.client.prepare("update lots set closed_at = ?, closed_for = 'full'").run(NOON);
    const foreign = tableOf(bag, { piles: [{ grams: 1000, lot: 2 }] });
    expect(refusal(() => correct(sortingId, foreign))).toMatchObject({
      code: "lot-closed",
      path: ["replacement", "piles", 0, "lot"],
    });
    const own = tableOf(bag, { piles: [{ grams: 900, lot: 1 }], rejects: [{ grams: 100 }] });
    expect(correct(sortingId, own).receipt?.lots).toMatchObject([
      { number: 1, opened: false, heldGrams: 900 },
    ]);
    expect(rows("select count(*) as n from lots")).toEqual([{ n: 2 }]);
  });

  it("without a replacement lets the bags wait again", () => {
    const bags = [shed.weigh(2160), shed.weigh(1000)];
    const { sortingId } = close(sorting(shed, bags, { piles: [{ grams: 3160 }] }));
    expect(correct(sortingId, null)).toMatchObject({ receipt: null });
    expect(bagStates()).toEqual(["weighed", "weighed"]);
    expect(listWaitingBags(shed.ctx("volunteer"), {}).waiting).toEqual({ bags: 2, grams: 3160 });
  });

  it("is judged like a new one, and refused to volunteers", () => {
    const bag = shed.weigh(1000);
    const { sortingId } = close(sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    expect(
      refusal(() => correct(sortingId, tableOf(bag, { piles: [{ grams: 900 }] }))),
    ).toMatchObject({
      code: "sum-beyond-tolerance",
      path: ["replacement", "cause"],
    });
    expect(refusal(() => correct(sortingId, null, "volunteer")).code).toBe("forbidden");
    expect(rows("select count(*) as n from entries")).toEqual([{ n: 2 }]);
    expect(
      heldBy(shed.db.reader, rows<{ h: number }>("select holder_id as h from lots")[0]?.h ?? 0, 3),
    ).toBe(1000);
  });
});
