import { describe, expect, it } from "vitest";
import { getLabel } from "@/lib/bags/queries";
import type { LabelCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import {
  addContainer,
  changeContainer,
  restoreContainer,
  retireContainer,
} from "@/lib/scales/commands/containers";
import type { TareKind } from "@/lib/scales/terms";
import { getContainer, listContainers, listManagedContainers } from "@/lib/scales/queries/scales";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

function added(scheme: TestScheme, name: string, kind: TareKind = "container") {
  const input = { requestId: newId(), kind, name, tareMilligrams: 1_240_000 };
  return addContainer(scheme.ctx("coordinator", NOON, input), input);
}

describe("addContainer", () => {
  commandCases({
    command: addContainer,
    by: "coordinator",
    notBy: "lead",
    input: () => ({
      requestId: newId(),
      kind: "container" as const,
      name: "Blue crate 1",
      tareMilligrams: 1_240_000,
    }),
    does: (scheme, answer, input) => {
      expect(answer).toMatchObject({
        kind: "container",
        name: "Blue crate 1",
        tareMilligrams: 1_240_000,
      });
      expect(getLabel(scheme.db.reader, answer.labelCode as LabelCode)).toEqual({
        kind: "container",
        subject: input.requestId,
      });
      expect(listContainers(scheme.ctx("volunteer")).items).toEqual([answer]);
    },
    wrongState: (scheme) => {
      added(scheme, "Blue crate 1");
      return {
        input: {
          requestId: newId(),
          kind: "sack" as const,
          name: "blue crate 1",
          tareMilligrams: 1,
        },
        code: "name-in-use",
      };
    },
    action: "containers.add",
  });
});

describe("changeContainer", () => {
  commandCases({
    command: changeContainer,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      containerId: added(scheme, "Blue crate 1").id,
      name: "Blue crate, mended",
      tareMilligrams: 1_310_000,
    }),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ name: "Blue crate, mended", tareMilligrams: 1_310_000 });
      expect(answer.labelCode).not.toBeNull();
      expect(getContainer(scheme.db.reader, answer.id)).toEqual(answer);
    },
    wrongState: () => ({
      input: {
        requestId: newId(),
        containerId: newId<"container">(),
        name: "Gone",
        tareMilligrams: 1,
      },
      code: "not-found",
    }),
    action: "containers.change",
  });
});

describe("retireContainer", () => {
  commandCases({
    command: retireContainer,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => ({ requestId: newId(), containerId: added(scheme, "Big tub").id }),
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBe(NOON);
      expect(listContainers(scheme.ctx("volunteer")).items).toEqual([]);
      expect(listManagedContainers(scheme.ctx())).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), containerId: newId<"container">() },
      code: "not-found",
    }),
    action: "containers.retire",
  });
});

describe("restoreContainer", () => {
  commandCases({
    command: restoreContainer,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      const { id } = added(scheme, "Big tub");
      const retire = { requestId: newId(), containerId: id };
      retireContainer(scheme.ctx("coordinator", NOON, retire), retire);
      return { requestId: newId(), containerId: id };
    },
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBeNull();
      expect(listContainers(scheme.ctx("volunteer")).items).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), containerId: newId<"container">() },
      code: "not-found",
    }),
    action: "containers.restore",
  });
});

describe("containers and sacks", () => {
  it("gives a sack no label, and keeps the lists from donors", () => {
    const scheme = newScheme();
    try {
      expect(added(scheme, "Rubble sack", "sack").labelCode).toBeNull();
      expect(refusalOf(() => listContainers(scheme.ctx("donor")))).toBe("forbidden");
    } finally {
      scheme.close();
    }
  });
});
