/** Entries leave the catalogue and come back. */
import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { planRun } from "@/lib/production/commands/plan-run";
import {
  restoreMachine,
  restorePiece,
  restoreTool,
  retireMachine,
  retirePiece,
  retireTool,
} from "@/lib/production/commands/retire";
import { addedMachine, addedPiece, addedTool, asLead } from "../../support/catalogue";
import { commandCases, refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { newWorkshop } from "../../support/workshop";

describe("retirePiece", () => {
  commandCases({
    command: retirePiece,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), pieceId: addedPiece(scheme).id }),
    does: (_, answer) => expect(answer.retiredAt).toBe(NOON),
    wrongState: () => ({
      input: { requestId: newId(), pieceId: newId<"piece">() },
      code: "not-found",
    }),
    action: "pieces.retire",
  });
});

describe("restorePiece", () => {
  commandCases({
    command: restorePiece,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const { id } = addedPiece(scheme);
      const retire = { requestId: newId(), pieceId: id };
      retirePiece(asLead(scheme, retire), retire);
      return { requestId: newId(), pieceId: id };
    },
    does: (_, answer) => expect(answer.retiredAt).toBeNull(),
    wrongState: () => ({
      input: { requestId: newId(), pieceId: newId<"piece">() },
      code: "not-found",
    }),
    action: "pieces.restore",
  });
});

describe("retireTool", () => {
  commandCases({
    command: retireTool,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), toolId: addedTool(scheme).id }),
    does: (_, answer) => expect(answer.retiredAt).toBe(NOON),
    wrongState: () => ({
      input: { requestId: newId(), toolId: newId<"tool">() },
      code: "not-found",
    }),
    action: "tools.retire",
  });
});

describe("restoreTool", () => {
  commandCases({
    command: restoreTool,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const { id } = addedTool(scheme);
      const retire = { requestId: newId(), toolId: id };
      retireTool(asLead(scheme, retire), retire);
      return { requestId: newId(), toolId: id };
    },
    does: (_, answer) => expect(answer.retiredAt).toBeNull(),
    wrongState: () => ({
      input: { requestId: newId(), toolId: newId<"tool">() },
      code: "not-found",
    }),
    action: "tools.restore",
  });
});

describe("retireMachine", () => {
  commandCases({
    command: retireMachine,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), machineId: addedMachine(scheme).id }),
    does: (_, answer) => expect(answer.retiredAt).toBe(NOON),
    wrongState: () => ({
      input: { requestId: newId(), machineId: newId<"machine">() },
      code: "not-found",
    }),
    action: "machines.retire",
  });
});

describe("restoreMachine", () => {
  commandCases({
    command: restoreMachine,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const { id } = addedMachine(scheme);
      const retire = { requestId: newId(), machineId: id };
      retireMachine(asLead(scheme, retire), retire);
      return { requestId: newId(), machineId: id };
    },
    does: (_, answer) => expect(answer.retiredAt).toBeNull(),
    wrongState: () => ({
      input: { requestId: newId(), machineId: newId<"machine">() },
      code: "not-found",
    }),
    action: "machines.restore",
  });
});

describe("a plan", () => {
  it("is not made with what has left the catalogue until that is brought back", () => {
    const shop = newWorkshop();
    const retire = { requestId: newId(), pieceId: shop.hookId };
    retirePiece(asLead(shop, retire), retire);
    const input = shop.planOf({});
    expect(refusalOf(() => planRun(asLead(shop, input), input))).toBe("not-in-catalogue");
    const back = { requestId: newId(), pieceId: shop.hookId };
    restorePiece(asLead(shop, back), back);
    expect(planRun(asLead(shop, input), input).number).toBe(1);
    shop.close();
  });
});
