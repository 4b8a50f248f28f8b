import { describe, expect, it } from "vitest";
import { likelyWhat, photoAlt } from "@/components/uploads/photo-alt";
import { photoStateWords, refusalWords, sendingWords } from "@/components/uploads/photo-words";
import { fitted } from "@/components/uploads/prepare-photo";
import { PHOTO_SENTENCES } from "@/lib/core/photo-messages";
import { day } from "@/lib/core/time";
import { newPhotoItem, type PhotoItem } from "@/lib/offline/photo-queue";

/** 6 May 2026 in London, still 5 May in New York. */
const ADDED = Date.UTC(2026, 4, 6, 1);
const facts = { what: "Blue HDPE", grams: 2160, day: null, timeZone: "Europe/London" };
const view = { purpose: "view" as const, addedAt: ADDED };

describe("what a picture shows, in words", () => {
  it("is what is known: material, weight, day", () => {
    expect(photoAlt(facts, view, 1, 1)).toBe("Blue HDPE, 2.160 kg, 6 May 2026");
  });

  it("tells several apart", () => {
    expect(photoAlt(facts, view, 2, 3)).toBe("Blue HDPE, 2.160 kg, 6 May 2026, photo 2 of 3");
  });

  it("names a chip, leaves out a weight that is not known, and takes the day of what is shown", () => {
    expect(
      photoAlt(
        { ...facts, grams: null, day: day("2026-05-01") },
        { ...view, purpose: "chip" },
        1,
        1,
      ),
    ).toBe("Chip of Blue HDPE, 1 May 2026");
  });

  it("goes by the scheme's own calendar", () => {
    expect(photoAlt({ ...facts, timeZone: "America/New_York" }, view, 1, 1)).toContain(
      "5 May 2026",
    );
  });

  it.each([
    ["PE-HD", "Blue", "Blue HDPE"],
    ["PE-HD", null, "HDPE"],
    ["O", null, "Other plastic"],
    ["O", "Blue", "Blue other plastic"],
    ["mixed", null, "Plastic to sort"],
    ["mixed", "Blue", "Blue plastic to sort"],
    ["not-sure", null, "Plastic to sort"],
  ] as const)("a bag said to be %s, %s is %s", (polymer, colour, words) => {
    expect(likelyWhat(polymer, colour)).toBe(words);
  });
});

describe("what is said of a picture on its way", () => {
  const item = (more: Partial<PhotoItem>): PhotoItem => ({
    ...newPhotoItem({
      photoId: "p",
      subjectKind: "lot",
      subjectId: "l",
      purpose: "view",
      helper: "ann",
      madeAt: 0,
      blob: new Blob(["x"]),
      width: 1,
      height: 1,
      middle: null,
    }),
    ...more,
  });

  it("says how far it is, and that the server still works at 100", () => {
    const sending = item({ state: "sending" });
    expect(photoStateWords(sending, undefined)).toBe("About to be sent");
    expect(photoStateWords(sending, 40)).toBe("40 % sent");
    expect(photoStateWords(sending, 100)).toBe("Sent, being checked");
  });

  it.each(["photo-storage-down", "photo-cut-off", "unreachable", "signed-out", "anything"])(
    "says that nothing is lost while it waits after %s",
    (code) => {
      const words = photoStateWords(item({ trouble: { code, values: {} } }), undefined);
      expect(words).toMatch(/kept on this phone/);
    },
  );

  it("has our own sentence for each refusal, and never a code", () => {
    for (const code of [...Object.keys(PHOTO_SENTENCES), "not-found", "forbidden", "internal"]) {
      const words = refusalWords({ code, values: { most: 12 } });
      expect(words).toMatch(/^[A-Z].*\.$/);
      expect(words).not.toContain(code);
      expect(words).not.toMatch(/undefined|uploadthing/i);
    }
  });

  it("says how many there is room for, although the answer to an upload is a code alone", () => {
    expect(refusalWords({ code: "photos-too-many", values: {} })).toContain("room for 12 pictures");
  });

  it("counts", () => {
    expect(sendingWords(1)).toBe("1 photo being sent");
    expect(sendingWords(2)).toBe("2 photos being sent");
  });
});

describe("the size that is sent", () => {
  it.each([
    [4000, 3000, 1600, 1200],
    [3000, 4000, 1200, 1600],
    [800, 600, 800, 600],
    [1600, 1600, 1600, 1600],
    [100_000, 10, 1600, 1],
  ])("%i by %i becomes %i by %i", (width, height, wide, high) => {
    expect(fitted(width, height, 1600)).toEqual({ width: wide, height: high });
  });
});
