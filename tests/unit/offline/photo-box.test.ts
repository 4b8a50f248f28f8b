import { describe, expect, it } from "vitest";
import { PhotoBox, type PhotoStore } from "@/lib/offline/photo-box";
import { newPhotoItem, type PhotoItem, type PhotoOutcome } from "@/lib/offline/photo-queue";
import { made, trouble, acknowledged } from "@/tests/support/photo-items";
import type { Photo } from "@/lib/uploads/contract";

/** Storage that outlives a PhotoBox, as IndexedDB outlives a page. */
function storage(): PhotoStore & { items: Map<string, PhotoItem> } {
  const items = new Map<string, PhotoItem>();
  return {
    items,
    all: async () => [...items.values()],
    put: async (item) => void items.set(item.photoId, item),
    replace: async (item) => {
      if (items.has(item.photoId)) items.set(item.photoId, item);
    },
    remove: async (id) => void items.delete(id),
  };
}

type Answer = (item: PhotoItem, signal: AbortSignal) => PhotoOutcome | Promise<PhotoOutcome>;

async function box(store: PhotoStore, answer: Answer, helper: string | null = "ann") {
  const clock = { now: 50_000 };
  const sent: string[] = [];
  const got: { item: PhotoItem; photo: Photo }[] = [];
  const locked = new Set<string>();
  const photos = new PhotoBox({
    store,
    upload: async (item, { signal, onProgress }) => {
      sent.push(item.photoId);
      onProgress(0);
      return answer(item, signal);
    },
    alone: async (id, work) => (locked.has(id) ? null : work()),
    tellOthers: () => undefined,
    now: () => clock.now,
  });
  photos.onSent((item, photo) => got.push({ item, photo }));
  await photos.setHelper(helper);
  return { photos, sent, got, clock, locked };
}

/** Runs what is only waiting for promises that are settled already. */
const settle = () => new Promise((resolve) => setTimeout(resolve, 5));

/** An upload that ends when it is told to, or when it is cancelled. */
function heldAnswer() {
  const ends = new Map<string, (outcome: PhotoOutcome) => void>();
  const answer: Answer = (item, signal) =>
    new Promise((resolve) => {
      ends.set(item.photoId, resolve);
      signal.addEventListener("abort", () => resolve({ kind: "cancelled" }));
    });
  return { ends, answer };
}

describe("the box", () => {
  it("keeps each picture before it sends it, and lets go of it after the answer", async () => {
    const store = storage();
    const seen: number[] = [];
    const { photos, got } = await box(store, (item) => {
      seen.push(store.items.size);
      return acknowledged(item);
    });
    expect(await photos.add([made(1), made(2)])).toBe(true);
    await settle();
    expect(seen[0]).toBe(2);
    expect(store.items.size).toBe(0);
    expect(got.map(({ photo }) => photo.id)).toEqual(["p01", "p02"]);
    expect(photos.view().mine).toEqual([]);
  });

  it("sends three at once, the rest as places come free, each once", async () => {
    const { ends, answer } = heldAnswer();
    const { photos, sent } = await box(storage(), answer);
    await photos.add([1, 2, 3].map((number) => made(number)));
    await photos.add([4, 5].map((number) => made(number)));
    await settle();
    expect(sent).toEqual(["p01", "p02", "p03"]);
    void photos.sendAll(true);
    await settle();
    expect(sent).toEqual(["p01", "p02", "p03"]);
    ends.get("p02")?.(acknowledged(newPhotoItem(made(2))));
    await settle();
    expect(sent).toEqual(["p01", "p02", "p03", "p04"]);
    expect(photos.view().mine.map(({ state }) => state)).toEqual([
      "sending",
      "sending",
      "sending",
      "waiting",
    ]);
  });

  it("is taken up again by the next page, also what was on its way", async () => {
    const store = storage();
    const first = await box(store, heldAnswer().answer);
    await first.photos.add([made(1), made(2)]);
    await settle();
    expect([...store.items.values()].map(({ state }) => state)).toEqual(["sending", "sending"]);
    const next = await box(store, acknowledged);
    await next.photos.sendAll(true);
    expect(next.sent).toEqual(["p01", "p02"]);
    expect(store.items.size).toBe(0);
  });

  it("sends nothing in another helper's session, and says only how many there are", async () => {
    const store = storage();
    const ann = await box(store, () => ({ kind: "stop", trouble: trouble("unreachable") }));
    await ann.photos.add([made(1), made(2)]);
    await settle();
    for (const who of ["bob", null]) {
      const other = await box(store, acknowledged, who);
      await other.photos.refresh();
      await other.photos.sendAll(true);
      expect(other.sent).toEqual([]);
      expect(other.photos.view()).toMatchObject({ mine: [], others: 2 });
    }
    const again = await box(store, acknowledged);
    await again.photos.sendAll(true);
    expect(again.sent).toEqual(["p01", "p02"]);
  });

  it("does not try the others when there is no answer at all", async () => {
    const { photos, sent } = await box(storage(), () => ({
      kind: "stop",
      trouble: trouble("unreachable"),
    }));
    await photos.add([1, 2, 3, 4, 5].map((number) => made(number)));
    await settle();
    expect(sent).toEqual(["p01", "p02", "p03"]);
    expect(photos.view()).toMatchObject({ waiting: 5, toLookAt: 0 });
  });

  it("tries again by itself once it is due, and at once when pressed", async () => {
    let down = true;
    const { photos, sent, clock } = await box(storage(), (item) =>
      down ? { kind: "later", trouble: trouble("photo-storage-down") } : acknowledged(item),
    );
    await photos.add([made(1)]);
    await settle();
    expect(photos.view().mine[0]).toMatchObject({
      state: "waiting",
      trouble: { code: "photo-storage-down" },
    });
    await photos.sendAll();
    expect(sent).toHaveLength(1);
    clock.now += 10_000;
    await photos.sendAll();
    expect(sent).toHaveLength(2);
    down = false;
    await photos.retry("p01");
    expect(sent).toHaveLength(3);
    expect(photos.view().mine).toEqual([]);
  });

  it("stops one by hand, keeps it, and sends it when asked", async () => {
    const { ends, answer } = heldAnswer();
    const store = storage();
    const { photos, sent } = await box(store, answer);
    await photos.add([made(1), made(2)]);
    await settle();
    await photos.cancel("p01");
    await settle();
    expect(store.items.get("p01")).toMatchObject({ state: "stopped" });
    expect(photos.view()).toMatchObject({ waiting: 1, toLookAt: 1 });
    await photos.sendAll(true);
    expect(sent).toEqual(["p01", "p02"]);
    void photos.retry("p01");
    await settle();
    expect(sent).toEqual(["p01", "p02", "p01"]);
    ends.get("p01")?.(acknowledged(newPhotoItem(made(1))));
    await settle();
    expect([...store.items.keys()]).toEqual(["p02"]);
  });

  it("deletes those of a subject that was given up, those on their way too, and no others", async () => {
    const { answer } = heldAnswer();
    const store = storage();
    const { photos, got } = await box(store, answer);
    await photos.add([made(1), made(2), made(3, { subjectId: "bag-2" })]);
    await settle();
    await photos.dropSubject("bag-1");
    await settle();
    expect([...store.items.keys()]).toEqual(["p03"]);
    expect(got).toEqual([]);
  });

  it("leaves alone what another tab is sending", async () => {
    const store = storage();
    const { photos, sent, locked } = await box(store, acknowledged);
    locked.add("p01");
    await photos.add([made(1), made(2)]);
    await settle();
    expect(sent).toEqual(["p02"]);
    expect([...store.items.keys()]).toEqual(["p01"]);
  });

  it("sends what the device cannot keep, and says that it cannot", async () => {
    const full: PhotoStore = {
      all: async () => [],
      put: () => Promise.reject(new Error("full")),
      replace: async () => undefined,
      remove: async () => undefined,
    };
    let down = true;
    const { photos, got } = await box(full, (item) =>
      down ? { kind: "later", trouble: trouble("photo-cut-off") } : acknowledged(item),
    );
    expect(await photos.add([made(1)])).toBe(false);
    await settle();
    expect(photos.view()).toMatchObject({ waiting: 1 });
    down = false;
    await photos.retry("p01");
    expect(got).toHaveLength(1);
    expect(photos.view().mine).toEqual([]);
  });
});
