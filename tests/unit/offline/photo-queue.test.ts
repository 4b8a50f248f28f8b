import { describe, expect, it } from "vitest";
import {
  afterPhotoSending,
  markPhotoRetried,
  markPhotoSending,
  newPhotoItem,
  photosToSend,
  photoViewFor,
} from "@/lib/offline/photo-queue";
import { made, trouble, acknowledged } from "@/tests/support/photo-items";

describe("what a photo goes through", () => {
  const item = markPhotoSending(newPhotoItem(made(1)));

  it("leaves only when it is acknowledged", () => {
    expect(afterPhotoSending(item, acknowledged(item), 0)).toBeNull();
    for (const outcome of [
      { kind: "later", trouble: trouble("photo-storage-down") },
      { kind: "refused", trouble: trouble("photo-not-a-picture") },
      { kind: "stop", trouble: trouble("unreachable") },
      { kind: "cancelled" },
    ] as const) {
      expect(afterPhotoSending(item, outcome, 0)).toMatchObject({
        photoId: "p01",
        blob: item.blob,
      });
    }
  });

  it("waits longer after each failure, at most two minutes, and not at all after a person's press", () => {
    const failed = { kind: "later", trouble: trouble("photo-cut-off") } as const;
    const pauses = [1, 2, 3, 4, 5, 9].map(
      (tries) => (afterPhotoSending({ ...item, tries }, failed, 1000)?.dueAt ?? 0) - 1000,
    );
    expect(pauses).toEqual([10_000, 20_000, 40_000, 80_000, 120_000, 120_000]);
    const after = afterPhotoSending({ ...item, tries: 5 }, failed, 1000);
    expect(after && markPhotoRetried(after)).toMatchObject({
      state: "waiting",
      tries: 0,
      dueAt: 0,
    });
  });

  it("is due again at once when there was no session or no answer", () => {
    const outcome = { kind: "stop", trouble: trouble("signed-out") } as const;
    expect(afterPhotoSending(item, outcome, 9000)).toMatchObject({ state: "waiting", dueAt: 0 });
  });

  it("is sent by its own helper only, oldest first, and not while a person has to look", () => {
    const items = [
      newPhotoItem(made(3)),
      newPhotoItem(made(1, { helper: "bob" })),
      { ...newPhotoItem(made(2)), state: "refused" as const },
      { ...newPhotoItem(made(4)), state: "stopped" as const },
      markPhotoSending(newPhotoItem(made(0))),
      { ...newPhotoItem(made(5)), dueAt: 9000 },
    ];
    const ids = (now: number | null) => photosToSend(items, "ann", now).map((one) => one.photoId);
    expect(ids(8999)).toEqual(["p00", "p03"]);
    expect(ids(9000)).toEqual(["p00", "p03", "p05"]);
    expect(ids(null)).toEqual(["p00", "p03", "p05"]);
    const view = photoViewFor(items, "ann", new Map());
    expect(view).toMatchObject({ waiting: 3, toLookAt: 2, others: 1 });
    expect(photoViewFor(items, null, new Map())).toMatchObject({ mine: [], others: 6 });
  });
});
