import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { addContainer, changeContainer, reweighContainer } from "@/lib/scales/commands/containers";
import { addScale } from "@/lib/scales/commands/scales";
import { listTares } from "@/lib/scales/queries/tares";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { NOON, type TestScheme } from "@/tests/support/scheme";
import { posted, weighingDesk } from "@/tests/support/weighing-desk";

function crateAndScale(scheme: TestScheme) {
  const ctx = scheme.ctx("coordinator");
  const { id: scaleId } = addScale(ctx, {
    requestId: newId(),
    name: "Bench scale",
    class: "III",
    maxMilligrams: 15_000_000,
    eMilligrams: 5_000,
    dMilligrams: 5_000,
  });
  const { id: containerId } = addContainer(ctx, {
    requestId: newId(),
    kind: "container",
    name: "Blue crate",
    tareMilligrams: 1_240_000,
  });
  return { scaleId, containerId };
}

describe("reweighContainer", () => {
  commandCases({
    command: reweighContainer,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      ...crateAndScale(scheme),
      readingMilligrams: 1_310_000,
    }),
    does: (scheme, answer, { containerId }) => {
      expect(answer).toMatchObject({ id: containerId, tareMilligrams: 1_310_000 });
      expect(listTares(scheme.ctx()).get(containerId)).toMatchObject([
        { tareMilligrams: 1_310_000, byName: "Test coordinator" },
      ]);
    },
    wrongState: (scheme) => ({
      input: {
        requestId: newId(),
        ...crateAndScale(scheme),
        containerId: newId<"container">(),
        readingMilligrams: 1_310_000,
      },
      code: "not-found",
    }),
    action: "containers.reweigh",
  });
});

describe("a container's tares over time", () => {
  const later = (minutes: number) => instant(NOON + minutes * 60_000);

  it("refuses what the scale cannot have shown, at the reading", () => {
    const desk = weighingDesk();
    try {
      const reweigh = (readingMilligrams: number) =>
        reweighContainer(desk.ctx("coordinator"), {
          requestId: newId(),
          containerId: desk.crate.id,
          scaleId: desk.scale.id,
          readingMilligrams,
        });
      expect(refusalOf(() => reweigh(1_602_000))).toBe("not-a-step");
      expect(refusalOf(() => reweigh(15_005_000))).toBe("above-max");
      expect(refusalOf(() => listTares(desk.ctx("volunteer")))).toBe("forbidden");
    } finally {
      desk.close();
    }
  });

  it("reads a ticket that waited with the tare of its own time, and the next with the new one", () => {
    const desk = weighingDesk();
    try {
      const [first = "", second = "", third = ""] = desk.tags(3);
      reweighContainer(desk.ctx("coordinator", later(30)), {
        requestId: newId(),
        containerId: desk.crate.id,
        scaleId: desk.scale.id,
        readingMilligrams: 1_700_000,
      });
      // Weighed at noon in the old crate, sent an hour later: 3.780 − 1.600 − 0.020.
      const waited = desk.weigh(first, {}, { occurredAt: NOON }, "volunteer", later(60));
      expect(posted(waited).netGrams).toBe(2160);
      // Weighed after the crate was: 3.780 − 1.700 − 0.020, whatever the phone still believes.
      const fresh = desk.weigh(second, {}, { occurredAt: later(45) }, "volunteer", later(60));
      expect(posted(fresh).netGrams).toBe(2060);

      changeContainer(desk.ctx("coordinator", later(90)), {
        requestId: newId(),
        containerId: desk.crate.id,
        name: "Blue crate, mended",
        tareMilligrams: 1_750_000,
      });
      const last = desk.weigh(third, {}, { occurredAt: later(91) }, "volunteer", later(91));
      expect(posted(last).netGrams).toBe(2010);
      expect(
        listTares(desk.ctx("coordinator"))
          .get(desk.crate.id)
          ?.map((tare) => tare.tareMilligrams),
      ).toEqual([1_750_000, 1_700_000, 1_600_000]);
    } finally {
      desk.close();
    }
  });
});
