import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { giveSpareTag, replaceTag } from "@/lib/bags/commands/spare-tag";
import {
  countSpareTags,
  getBagByCode,
  getLabel,
  getPublicLabel,
  getTagOrderSheet,
  listBagsOfOrder,
  listCodesOfBag,
  listTagOrders,
  ORDERS_PER_PAGE,
} from "@/lib/bags/queries";
import { drawCode, readCode, type LabelCode } from "@/lib/core/bag-code";
import { newId, type PointId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { inTransaction } from "@/lib/platform/database";
import { addPoint, closePoint, setUpPointsIn } from "@/lib/points/commands";
import { getBuiltInPoint } from "@/lib/points/queries";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

/** A code that nobody drew: its seven symbols are all Z. */
const NOBODYS = drawCode(() => 31);

function library(scheme: TestScheme): PointId {
  const input = { requestId: newId(), name: "Harbour Road Library", kind: "library" as const };
  return addPoint(scheme.ctx("coordinator", NOON, input), input).id;
}

function builtIn(scheme: TestScheme, kind: "shed" | "not-known"): PointId {
  inTransaction(scheme, (tx) => setUpPointsIn(tx, scheme.ctx("system"), NOON));
  const point = getBuiltInPoint(scheme.db.reader, kind);
  if (!point) throw new Error("no built-in point");
  return point.id;
}

/** Codes of a new order. */
function ordered(scheme: TestScheme, count: number, pointId: PointId | null): LabelCode[] {
  const input = { requestId: newId(), count, pointId };
  const { id } = orderTags(scheme.ctx("coordinator", NOON, input), input);
  return getTagOrderSheet(scheme.ctx(), id)?.codes ?? [];
}

function first(codes: readonly LabelCode[]): LabelCode {
  const [code] = codes;
  if (!code) throw new Error("no code");
  return code;
}

describe("orderTags", () => {
  commandCases({
    command: orderTags,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => ({ requestId: newId(), count: 40, pointId: library(scheme) }),
    does: (scheme, answer, input) => {
      expect(answer).toEqual({
        id: input.requestId,
        count: 40,
        pointId: input.pointId,
        orderedAt: NOON,
      });
      const sheet = getTagOrderSheet(scheme.ctx(), answer.id);
      expect(new Set(sheet?.codes).size).toBe(40);
      for (const code of sheet?.codes ?? []) {
        expect(readCode(code)).toEqual({ ok: true, code });
        expect(getBagByCode(scheme.db.reader, code)).toMatchObject({
          code,
          state: "printed",
          stateSince: NOON,
          pointId: input.pointId,
          pointName: "Harbour Road Library",
        });
      }
      expect(listTagOrders(scheme.ctx())).toEqual([
        expect.objectContaining({
          id: answer.id,
          count: 40,
          unused: 40,
          pointName: "Harbour Road Library",
        }),
      ]);
    },
    wrongState: (scheme) => {
      const pointId = library(scheme);
      const close = { requestId: newId(), pointId };
      closePoint(scheme.ctx("coordinator", NOON, close), close);
      return { input: { requestId: newId(), count: 1, pointId }, code: "unknown-point" };
    },
    action: "tags.order",
  });
});

describe("giveSpareTag", () => {
  commandCases({
    command: giveSpareTag,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => ({
      requestId: newId(),
      pointId: builtIn(scheme, "shed"),
      code: first(ordered(scheme, 1, null)),
    }),
    does: (scheme, answer, input) => {
      expect(answer).toMatchObject({
        code: input.code,
        state: "picked-up",
        pointName: "At the shed",
      });
      expect(getBagByCode(scheme.db.reader, input.code)).toMatchObject({
        id: answer.id,
        pointId: input.pointId,
      });
    },
    wrongState: (scheme) => {
      builtIn(scheme, "shed");
      const code = first(ordered(scheme, 1, library(scheme)));
      return {
        input: { requestId: newId(), pointId: builtIn(scheme, "shed"), code },
        code: "label-in-use",
      };
    },
    action: "bags.spare-tag",
  });
});

describe("replaceTag", () => {
  commandCases({
    command: replaceTag,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => ({
      requestId: newId(),
      code: first(ordered(scheme, 1, library(scheme))),
      newCode: first(ordered(scheme, 1, null)),
    }),
    does: (scheme, answer, input) => {
      const old = getBagByCode(scheme.db.reader, input.code);
      expect(old).not.toBeNull();
      expect(getBagByCode(scheme.db.reader, input.newCode)).toEqual(old);
      if (old) {
        expect(listCodesOfBag(scheme.db.reader, old)).toEqual([input.code, input.newCode]);
      }
      expect(answer).toMatchObject({
        newCode: input.newCode,
        bag: { code: input.code, id: old?.id },
      });
    },
    wrongState: (scheme) => {
      const pointId = library(scheme);
      const [code, taken] = ordered(scheme, 2, pointId);
      return {
        input: { requestId: newId(), code: code ?? NOBODYS, newCode: taken ?? NOBODYS },
        code: "label-in-use",
      };
    },
    action: "bags.replace-tag",
  });
});

describe("tags", () => {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
  });
  afterEach(() => scheme.close());

  it("draws again when a code is taken", () => {
    const draws = [...Array<number>(14).fill(5), 1, 2, 3, 4, 5, 6, 7];
    let at = 0;
    const random = () => draws[at++] ?? at % 32;
    const codes = inTransaction(scheme, (tx) => [
      makeLabelIn(tx, "bag", newId(), NOON, random),
      makeLabelIn(tx, "bag", newId(), NOON, random),
    ]);
    expect(codes[0]).toMatch(/^5{7}/);
    expect(codes[1]).not.toBe(codes[0]);
    expect(at).toBeGreaterThan(14);
  });

  it("gives a new code, from Not known, when neither tag nor point is named", () => {
    const notKnown = builtIn(scheme, "not-known");
    const input = { requestId: newId() };
    const bag = giveSpareTag(scheme.ctx("volunteer", NOON, input), input);
    expect(bag).toMatchObject({ pointId: notKnown, pointName: "Not known", state: "picked-up" });
    expect(getBagByCode(scheme.db.reader, bag.code as LabelCode)?.id).toBe(bag.id);
  });

  it("gives no spare tag from a real point, and none twice", () => {
    const shed = builtIn(scheme, "shed");
    const code = first(ordered(scheme, 1, null));
    const give = (pointId: PointId) => {
      const input = { requestId: newId(), pointId, code };
      return giveSpareTag(scheme.ctx("volunteer", NOON, input), input);
    };
    expect(refusalOf(() => give(library(scheme)))).toBe("unknown-point");
    give(shed);
    expect(refusalOf(() => give(shed))).toBe("label-in-use");
  });

  it("says that a code belongs to no tag", () => {
    builtIn(scheme, "shed");
    const input = { requestId: newId(), code: NOBODYS };
    expect(refusalOf(() => giveSpareTag(scheme.ctx("volunteer", NOON, input), input))).toBe(
      "unknown-code",
    );
    expect(refusalOf(() => replaceTag(scheme.ctx("volunteer", NOON, input), input))).toBe(
      "unknown-code",
    );
    expect(getPublicLabel(scheme.ctx("nobody"), NOBODYS)).toBeNull();
  });

  it("closes the unused bag of a tag that changed hands, and never gives that tag again", () => {
    builtIn(scheme, "shed");
    const code = first(ordered(scheme, 1, library(scheme)));
    const spares = { requestId: newId(), count: 1, pointId: null };
    const { id } = orderTags(scheme.ctx("coordinator", NOON, spares), spares);
    const newCode = first(getTagOrderSheet(scheme.ctx(), id)?.codes ?? []);
    const input = { requestId: newId(), code, newCode };
    replaceTag(scheme.ctx("volunteer", NOON, input), input);
    expect(listBagsOfOrder(scheme.ctx(), id).map((bag) => bag.state)).toEqual(["closed"]);
    const again = { requestId: newId(), code: newCode };
    expect(refusalOf(() => giveSpareTag(scheme.ctx("volunteer", NOON, again), again))).toBe(
      "label-in-use",
    );
  });

  it("draws a new code for a lost tag when none is at hand", () => {
    const code = first(ordered(scheme, 1, library(scheme)));
    const input = { requestId: newId(), code };
    const { newCode } = replaceTag(scheme.ctx("lead", NOON, input), input);
    expect(newCode).not.toBe(code);
    expect(getLabel(scheme.db.reader, newCode as LabelCode)).toEqual({
      kind: "bag",
      subject: getBagByCode(scheme.db.reader, code)?.id,
    });
  });

  it("shows anybody a bag without anything of a person", () => {
    const code = first(ordered(scheme, 1, library(scheme)));
    expect(getPublicLabel(scheme.ctx("nobody"), code)).toEqual({
      kind: "bag",
      bag: {
        code,
        pointName: "Harbour Road Library",
        pointKind: "library",
        state: "printed",
        stateSince: NOON,
      },
    });
  });

  it("tells anybody no more of another label than what it is on", () => {
    const code = inTransaction(scheme, (tx) => makeLabelIn(tx, "container", newId(), NOON));
    expect(getPublicLabel(scheme.ctx("nobody"), code)).toEqual({ kind: "container" });
    expect(getBagByCode(scheme.db.reader, code)).toBeNull();
  });

  it("counts the tags that are left as spares", () => {
    builtIn(scheme, "shed");
    ordered(scheme, 4, library(scheme));
    const [code] = ordered(scheme, 3, null);
    expect(countSpareTags(scheme.ctx("volunteer"))).toBe(3);
    const input = { requestId: newId(), code };
    giveSpareTag(scheme.ctx("volunteer", NOON, input), input);
    expect(countSpareTags(scheme.ctx("volunteer"))).toBe(2);
  });

  it("lists orders newest first, and older ones by the page, also of one instant", () => {
    const order = (at: number) => {
      const input = { requestId: newId(), count: 1, pointId: null };
      return orderTags(scheme.ctx("coordinator", instant(at), input), input).id;
    };
    const made = Array.from({ length: ORDERS_PER_PAGE + 2 }, (_, at) =>
      order(NOON + (at < 4 ? 0 : at)),
    );
    const first = listTagOrders(scheme.ctx());
    expect(first).toHaveLength(ORDERS_PER_PAGE);
    expect(first[0]?.id).toBe(made.at(-1));
    const older = listTagOrders(scheme.ctx(), first.at(-1)?.id);
    expect(older).toHaveLength(2);
    expect(new Set([...first, ...older].map((one) => one.id))).toEqual(new Set(made));
  });

  it("keeps orders and their codes from everybody but coordinators", () => {
    expect(refusalOf(() => listTagOrders(scheme.ctx("lead")))).toBe("forbidden");
    expect(refusalOf(() => getTagOrderSheet(scheme.ctx("lead"), newId()))).toBe("forbidden");
    expect(getTagOrderSheet(scheme.ctx(), newId())).toBeNull();
  });
});
