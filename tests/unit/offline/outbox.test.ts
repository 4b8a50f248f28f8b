import { describe, expect, it } from "vitest";
import * as fc from "fast-check";
import { Outbox, type QueueStore } from "@/lib/offline/outbox";
import {
  afterSending,
  itemsToSend,
  markSending,
  newItem,
  viewFor,
  type NewItem,
  type QueueItem,
  type SendOutcome,
} from "@/lib/offline/queue";

const made = (number: number, helper = "ann"): NewItem => ({
  requestId: `r${String(number).padStart(3, "0")}`,
  method: "POST",
  path: "/api/weigh-ins",
  rawBody: `{"n":${number}}`,
  helper,
  madeAt: 1000 + number,
  label: `bag ${number}`,
});

/** Storage that outlives an Outbox, as IndexedDB outlives a page. */
function storage(): QueueStore & { items: Map<string, QueueItem> } {
  const items = new Map<string, QueueItem>();
  return {
    items,
    all: async () => [...items.values()],
    put: async (item) => void items.set(item.requestId, item),
    replace: async (item) => {
      if (items.has(item.requestId)) items.set(item.requestId, item);
    },
    remove: async (id) => void items.delete(id),
  };
}

function box(store: QueueStore, answer: (item: QueueItem) => SendOutcome) {
  const sent: string[] = [];
  const receipts: unknown[] = [];
  let locked = false;
  const outbox = new Outbox({
    store,
    send: async (item) => {
      sent.push(item.requestId);
      return answer(item);
    },
    alone: async (work) => {
      if (locked) return null;
      locked = true;
      try {
        return await work();
      } finally {
        locked = false;
      }
    },
    tellOthers: () => undefined,
    onReceipt: (_, receipt) => receipts.push(receipt),
  });
  return { outbox, sent, receipts, lock: (on: boolean) => (locked = on) };
}
const receipt: SendOutcome = { kind: "receipt", receipt: "ok" };
const refused: SendOutcome = {
  kind: "refused",
  refusal: { code: "above-max", sentence: "Too heavy." },
};

describe("the outbox", () => {
  it("keeps an item until its receipt is in", async () => {
    const store = storage();
    let answer: SendOutcome = { kind: "stop", why: "unreachable" };
    const { outbox, receipts } = box(store, () => answer);
    await outbox.setHelper("ann");
    expect(await outbox.add(made(1))).toEqual({ kind: "stop", why: "unreachable" });
    expect(outbox.view()).toMatchObject({ waiting: 1, refused: 0 });
    answer = receipt;
    await outbox.sendAll();
    expect(outbox.view()).toMatchObject({ waiting: 0, mine: [] });
    expect(receipts).toEqual(["ok"]);
  });

  it("finds its items again after a reload, also one that was on its way", async () => {
    const store = storage();
    await store.put(markSending(newItem(made(1))));
    const { outbox, sent } = box(store, () => receipt);
    await outbox.setHelper("ann");
    await outbox.sendAll();
    expect(sent).toEqual(["r001"]);
    expect(store.items.size).toBe(0);
  });

  it("sends only in its helper's session, and shows others as a number", async () => {
    const store = storage();
    await store.put(newItem(made(1, "ann")));
    await store.put(newItem(made(2, "ben")));
    const { outbox, sent } = box(store, () => receipt);
    await outbox.sendAll();
    expect(sent).toEqual([]);
    await outbox.setHelper("ben");
    await outbox.sendAll();
    expect(sent).toEqual(["r002"]);
    expect(outbox.view()).toMatchObject({ mine: [], others: 1 });
  });

  it("keeps a refused item with its reason and never sends it again by itself", async () => {
    const store = storage();
    const { outbox, sent } = box(store, () => refused);
    await outbox.setHelper("ann");
    await outbox.add(made(1));
    await outbox.sendAll();
    expect(sent).toEqual(["r001"]);
    expect(outbox.view().mine[0]).toMatchObject({
      state: "refused",
      refusal: { sentence: "Too heavy." },
    });
    await outbox.drop("r001");
    expect(store.items.size).toBe(0);
  });

  it("goes on to the others when the server cannot take one, and stops when none answers", async () => {
    const store = storage();
    for (const number of [1, 2, 3]) await store.put(newItem(made(number)));
    const later = box(store, (item) => (item.requestId === "r001" ? { kind: "later" } : receipt));
    await later.outbox.setHelper("ann");
    await later.outbox.sendAll();
    expect(later.sent).toEqual(["r001", "r002", "r003"]);
    expect([...store.items.keys()]).toEqual(["r001"]);
    await store.put(newItem(made(4)));
    const gone = box(store, () => ({ kind: "stop", why: "unreachable" }));
    await gone.outbox.setHelper("ann");
    await gone.outbox.sendAll();
    expect(gone.sent).toEqual(["r001"]);
    expect(store.items.size).toBe(2);
  });

  it("does not send while another tab does", async () => {
    const store = storage();
    const { outbox, sent, lock } = box(store, () => receipt);
    await outbox.setHelper("ann");
    lock(true);
    expect(await outbox.add(made(1))).toEqual({ kind: "stop", why: "other-tab" });
    expect(sent).toEqual([]);
    expect(store.items.size).toBe(1);
    lock(false);
    await outbox.sendAll();
    expect(sent).toEqual(["r001"]);
  });

  it("sends what was added while a pass ran", async () => {
    const store = storage();
    await store.put(newItem(made(1)));
    let outbox: Outbox | null = null;
    const parts = box(store, (item) => {
      if (item.requestId === "r001") void outbox?.add(made(2));
      return receipt;
    });
    outbox = parts.outbox;
    await outbox.setHelper("ann");
    await outbox.sendAll();
    expect(parts.sent).toEqual(["r001", "r002"]);
    expect(store.items.size).toBe(0);
  });

  it("does not bring back what a person deleted while it was on its way", async () => {
    const store = storage();
    const { outbox } = box(store, (item) => {
      store.items.delete(item.requestId);
      return { kind: "stop", why: "unreachable" };
    });
    await outbox.setHelper("ann");
    await outbox.add(made(1));
    expect(store.items.size).toBe(0);
  });
});

const outcome = fc.constantFrom<SendOutcome>(
  receipt,
  refused,
  { kind: "later" },
  { kind: "stop", why: "unreachable" },
);

describe("queue rules", () => {
  it("let an item go by its receipt only, and never change what will be sent", () => {
    fc.assert(
      fc.property(fc.array(outcome, { maxLength: 12 }), (outcomes) => {
        const first = newItem(made(1));
        let item: QueueItem | null = first;
        for (const each of outcomes) {
          if (!item || item.state === "refused") break;
          const sending = markSending(item);
          item = afterSending(sending, each);
          expect(item === null).toBe(each.kind === "receipt");
          if (item) {
            expect(item.rawBody).toBe(first.rawBody);
            expect(item.requestId).toBe(first.requestId);
            expect(item.tries).toBe(sending.tries);
          }
        }
      }),
    );
  });

  it("send oldest first, and count every item once", () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.record({
            number: fc.integer({ min: 0, max: 50 }),
            helper: fc.constantFrom("ann", "ben"),
            state: fc.constantFrom<QueueItem["state"]>("queued", "sending", "refused"),
          }),
        ),
        (specs) => {
          const items = specs.map(({ number, helper, state }) => ({
            ...newItem(made(number, helper)),
            state,
          }));
          const toSend = itemsToSend(items, "ann");
          expect(toSend.every((i) => i.helper === "ann" && i.state !== "refused")).toBe(true);
          expect(toSend.map((i) => i.madeAt)).toEqual(
            toSend.map((i) => i.madeAt).sort((a, b) => a - b),
          );
          const view = viewFor(items, "ann");
          expect(view.waiting).toBe(toSend.length);
          expect(view.waiting + view.refused + view.others).toBe(items.length);
        },
      ),
    );
  });
});
