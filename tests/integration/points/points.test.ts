import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type PointId } from "@/lib/core/ids";
import { inTransaction } from "@/lib/platform/database";
import {
  addPoint,
  changePoint,
  closePoint,
  reopenPoint,
  setUpPointsIn,
} from "@/lib/points/commands";
import {
  getBuiltInPoint,
  getPoint,
  listManagedPoints,
  listOpenPoints,
  listPoints,
} from "@/lib/points/queries";
import { auditRows, commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

function added(scheme: TestScheme, name: string): PointId {
  const input = { requestId: newId(), name, kind: "library" as const };
  return addPoint(scheme.ctx("coordinator", NOON, input), input).id;
}

function setUp(scheme: TestScheme): void {
  inTransaction(scheme, (tx) => setUpPointsIn(tx, scheme.ctx("system"), NOON));
}

describe("addPoint", () => {
  commandCases({
    command: addPoint,
    by: "coordinator",
    notBy: "lead",
    input: () => ({
      requestId: newId(),
      name: "  Harbour  Road Library ",
      kind: "library" as const,
    }),
    does: (scheme, answer, input) => {
      expect(answer).toEqual({
        id: input.requestId,
        name: "Harbour Road Library",
        kind: "library",
        closedAt: null,
      });
      expect(getPoint(scheme.db.reader, answer.id)).toMatchObject({
        name: "Harbour Road Library",
        createdAt: NOON,
      });
    },
    wrongState: (scheme) => {
      added(scheme, "Harbour Road Library");
      return {
        input: { requestId: newId(), name: "harbour road  LIBRARY", kind: "school" as const },
        code: "name-in-use",
      };
    },
    action: "points.add",
  });
});

describe("changePoint", () => {
  commandCases({
    command: changePoint,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      pointId: added(scheme, "Tide Café"),
      name: "tide café",
      kind: "cafe" as const,
    }),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ name: "tide café", kind: "cafe" });
      expect(getPoint(scheme.db.reader, answer.id)).toMatchObject({
        name: "tide café",
        kind: "cafe",
      });
    },
    wrongState: (scheme) => {
      setUp(scheme);
      const builtIn = getBuiltInPoint(scheme.db.reader, "shed");
      if (!builtIn) throw new Error("no built-in point");
      return {
        input: {
          requestId: newId(),
          pointId: builtIn.id,
          name: "Elsewhere",
          kind: "other" as const,
        },
        code: "point-built-in",
      };
    },
    action: "points.change",
  });
});

describe("closePoint", () => {
  commandCases({
    command: closePoint,
    by: "coordinator",
    notBy: "donor",
    input: (scheme) => ({ requestId: newId(), pointId: added(scheme, "Boatyard gate") }),
    does: (scheme, answer) => {
      expect(answer.closedAt).toBe(NOON);
      expect(listOpenPoints(scheme.ctx("nobody"))).toEqual([]);
      expect(listManagedPoints(scheme.ctx()).map((point) => point.closedAt)).toEqual([NOON]);
    },
    wrongState: () => ({
      input: { requestId: newId(), pointId: newId<"point">() },
      code: "not-found",
    }),
    action: "points.close",
  });
});

describe("reopenPoint", () => {
  commandCases({
    command: reopenPoint,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      const pointId = added(scheme, "Boatyard gate");
      const close = { requestId: newId(), pointId };
      closePoint(scheme.ctx("coordinator", NOON, close), close);
      return { requestId: newId(), pointId };
    },
    does: (scheme, answer) => {
      expect(answer.closedAt).toBeNull();
      expect(listOpenPoints(scheme.ctx("nobody"))).toHaveLength(1);
    },
    wrongState: (scheme) => {
      setUp(scheme);
      const builtIn = getBuiltInPoint(scheme.db.reader, "not-known");
      if (!builtIn) throw new Error("no built-in point");
      return { input: { requestId: newId(), pointId: builtIn.id }, code: "point-built-in" };
    },
    action: "points.reopen",
  });
});

describe("drop-off points", () => {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
  });
  afterEach(() => scheme.close());

  it("sets up the two built-in points once", () => {
    setUp(scheme);
    setUp(scheme);
    const { items } = listPoints(scheme.ctx("volunteer"));
    expect(items.map(({ name, kind, builtIn }) => [name, kind, builtIn])).toEqual([
      ["At the shed", "shed", true],
      ["Not known", "not-known", true],
    ]);
    expect(auditRows(scheme)).toHaveLength(2);
  });

  it("lists open points to anybody by name, without the built-in ones and without more than is on the door", () => {
    setUp(scheme);
    added(scheme, "Mill School");
    const cafe = added(scheme, "Café Ebb");
    expect(listOpenPoints(scheme.ctx("nobody"))).toEqual([
      { id: cafe, name: "Café Ebb", kind: "library" },
      expect.objectContaining({ name: "Mill School" }),
    ]);
  });

  it("gives lists to choose from to the shed only", () => {
    expect(refusalOf(() => listPoints(scheme.ctx("donor")))).toBe("forbidden");
    expect(refusalOf(() => listManagedPoints(scheme.ctx("lead")))).toBe("forbidden");
  });

  it("does not take the name of a built-in or of a closed point", () => {
    setUp(scheme);
    const pointId = added(scheme, "Mill School");
    const close = { requestId: newId(), pointId };
    closePoint(scheme.ctx("coordinator", NOON, close), close);
    expect(refusalOf(() => added(scheme, "mill school"))).toBe("name-in-use");
    expect(refusalOf(() => added(scheme, "At the Shed"))).toBe("name-in-use");
  });
});
