/** The commands of the workshop's catalogue. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { addMachine, changeMachine, setDensity } from "@/lib/production/commands/machines";
import { addPiece, changePiece, weighPieces } from "@/lib/production/commands/pieces";
import { addTool, changeTool } from "@/lib/production/commands/tools";
import type { PieceData } from "@/lib/production/contract/catalogue";
import { getCatalogue } from "@/lib/production/queries/catalogue";
import {
  addedMachine,
  addedPiece,
  addedTool,
  asLead,
  coaster,
  mould,
  press,
} from "../../support/catalogue";
import { auditRows, commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";

describe("addPiece", () => {
  commandCases({
    command: addPiece,
    by: "lead",
    notBy: "volunteer",
    input: () => ({ requestId: newId(), ...coaster }),
    does: (scheme, answer, { requestId }) => {
      expect(answer).toMatchObject({ id: requestId, name: "Coaster", massMilligrams: 26_000 });
      expect([...answer.polymers].sort()).toEqual(["PE-HD", "PP"]);
      expect(getCatalogue(scheme.ctx("volunteer")).pieces).toEqual([answer]);
    },
    wrongState: (scheme) => {
      addedPiece(scheme);
      return { input: { requestId: newId(), ...coaster, name: "coaster" }, code: "name-in-use" };
    },
    action: "pieces.add",
  });
});

describe("changePiece", () => {
  commandCases({
    command: changePiece,
    by: "coordinator",
    notBy: "donor",
    input: (scheme) => ({
      requestId: newId(),
      pieceId: addedPiece(scheme).id,
      ...coaster,
      polymers: ["PP" as const],
      priceCents: 500,
    }),
    does: (_, answer) => expect(answer).toMatchObject({ polymers: ["PP"], priceCents: 500 }),
    wrongState: () => ({
      input: { requestId: newId(), pieceId: newId<"piece">(), ...coaster },
      code: "not-found",
    }),
    action: "pieces.change",
  });
});

describe("weighPieces", () => {
  commandCases({
    command: weighPieces,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      pieceId: addedPiece(scheme).id,
      count: 10,
      milligrams: 262_404,
    }),
    does: (_, answer) =>
      expect(answer).toMatchObject({ weighedMilligrams: 26_240, weighedPieces: 10 }),
    wrongState: () => ({
      input: { requestId: newId(), pieceId: newId<"piece">(), count: 10, milligrams: 262_000 },
      code: "not-found",
    }),
    action: "pieces.weigh",
  });
});

describe("addTool", () => {
  commandCases({
    command: addTool,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => ({ requestId: newId(), ...mould(addedPiece(scheme).id) }),
    does: (scheme, answer, { requestId, ...data }) => {
      expect(answer).toEqual({ id: requestId, retiredAt: null, ...data });
      expect(getCatalogue(scheme.ctx("volunteer")).tools).toEqual([answer]);
    },
    wrongState: () => ({
      input: { requestId: newId(), ...mould(newId<"piece">()) },
      code: "not-found",
    }),
    action: "tools.add",
  });
});

describe("changeTool", () => {
  commandCases({
    command: changeTool,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => {
      const { id, pieceId } = addedTool(scheme);
      return { requestId: newId(), toolId: id, ...mould(pieceId), cavities: 4, gates: 2 };
    },
    does: (_, answer) => expect(answer).toMatchObject({ cavities: 4, gates: 2 }),
    wrongState: (scheme) => {
      const { id, pieceId } = addedTool(scheme);
      const other = { requestId: newId(), ...mould(pieceId), name: "Prototype" };
      addTool(asLead(scheme, other), other);
      return {
        input: { requestId: newId(), toolId: id, ...mould(pieceId), name: "PROTOTYPE" },
        code: "name-in-use",
      };
    },
    action: "tools.change",
  });
});

describe("addMachine", () => {
  commandCases({
    command: addMachine,
    by: "lead",
    notBy: "volunteer",
    input: () => ({ requestId: newId(), ...press }),
    does: (scheme, answer, { requestId, ...data }) => {
      expect(answer).toEqual({ id: requestId, retiredAt: null, ...data });
      expect(getCatalogue(scheme.ctx("volunteer")).machines).toEqual([answer]);
    },
    wrongState: (scheme) => {
      addedMachine(scheme);
      return { input: { requestId: newId(), ...press }, code: "name-in-use" };
    },
    action: "machines.add",
  });
});

describe("changeMachine", () => {
  commandCases({
    command: changeMachine,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => ({
      requestId: newId(),
      machineId: addedMachine(scheme).id,
      ...press,
      setPoints: [{ polymer: "PP" as const, celsius: 200 }],
    }),
    does: (_, answer) => expect(answer.setPoints).toEqual([{ polymer: "PP", celsius: 200 }]),
    wrongState: () => ({
      input: { requestId: newId(), machineId: newId<"machine">(), ...press },
      code: "not-found",
    }),
    action: "machines.change",
  });
});

describe("with a catalogue", () => {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
  });
  afterEach(() => scheme.close());

  const densityOf = (polymer: string) =>
    getCatalogue(scheme.ctx("volunteer")).densities.find((one) => one.polymer === polymer);

  it("plans with the scheme's own density and its source, until it goes back to the reference", () => {
    const reference = densityOf("PP");
    expect(reference).toMatchObject({ own: false });
    const set = (mgPerCm3: number | null, source: string) => {
      const input = { requestId: newId(), polymer: "PP" as const, mgPerCm3, source };
      return setDensity(asLead(scheme, input), input);
    };
    const own = { polymer: "PP", mgPerCm3: 911, source: "own sheet, weighed", own: true };
    expect(set(911, "own sheet, weighed")).toEqual(own);
    expect(densityOf("PP")).toEqual(own);
    expect(set(null, "")).toEqual(reference);
    expect(densityOf("PP")).toEqual(reference);
    expect(auditRows(scheme).map(({ action }) => action)).toEqual([
      "machines.density",
      "machines.density",
    ]);
    const input = { requestId: newId(), polymer: "PP" as const, mgPerCm3: 900, source: "x" };
    expect(refusalOf(() => setDensity(scheme.ctx("volunteer", NOON, input), input))).toBe(
      "forbidden",
    );
  });

  it("sets a density once for one request", () => {
    const input = { requestId: newId(), polymer: "PP" as const, mgPerCm3: 911, source: "own" };
    const first = setDensity(asLead(scheme, input), input);
    expect(setDensity(asLead(scheme, input), input)).toEqual(first);
    expect(auditRows(scheme)).toHaveLength(1);
    const other = asLead(scheme, { ...input, mgPerCm3: 920 });
    expect(refusalOf(() => setDensity(other, input))).toBe("request-id-reused");
  });

  it("forgets what was weighed when the piece becomes another one, not when its price changes", () => {
    const { id } = addedPiece(scheme);
    const weigh = { requestId: newId(), pieceId: id, count: 10, milligrams: 262_000 };
    weighPieces(asLead(scheme, weigh), weigh);
    const change = (data: Partial<PieceData>) => {
      const input = { requestId: newId(), pieceId: id, ...coaster, ...data };
      return changePiece(asLead(scheme, input), input);
    };
    expect(change({ priceCents: 600 }).weighedMilligrams).toBe(26_200);
    expect(change({ massMilligrams: 30_000 }).weighedMilligrams).toBeNull();
  });

  it("keeps of a piece only what its method asks for", () => {
    const pressed = addedPiece(scheme, {
      method: "pressing",
      lengthUm: 200_000,
      widthUm: 250_000,
      thicknessUm: 3_000,
      trimThousandths: 50,
      piecesPerSheet: 9,
    });
    expect(pressed).toMatchObject({ piecesPerSheet: null, massMilligrams: null, volumeMm3: null });
  });

  it("is not for donors to see", () => {
    expect(refusalOf(() => getCatalogue(scheme.ctx("donor")))).toBe("forbidden");
  });
});
