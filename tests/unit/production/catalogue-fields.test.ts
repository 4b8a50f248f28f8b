import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import {
  addMachineEndpoint,
  addPieceEndpoint,
  addToolEndpoint,
  setDensityEndpoint,
  weighPiecesEndpoint,
} from "@/lib/production/contract/catalogue";
import { coaster, mould, press } from "../../support/catalogue";

describe("fields of the catalogue", () => {
  type Read = { error?: { issues: readonly { path: PropertyKey[]; message: string }[] } };
  const issuesOf = ({ error }: Read) =>
    (error?.issues ?? []).map(({ path, message }) => `${path.join(".")}: ${message}`);
  const requestId = newId();
  const piece = (data: object) =>
    issuesOf(addPieceEndpoint.input.safeParse({ requestId, ...coaster, ...data }));
  const tool = (data: object) =>
    issuesOf(addToolEndpoint.input.safeParse({ requestId, ...mould(newId<"piece">()), ...data }));
  const machine = (data: object) =>
    issuesOf(addMachineEndpoint.input.safeParse({ requestId, ...press, ...data }));

  it("take text with a comma, and units", () => {
    const read = addPieceEndpoint.input.parse({
      requestId,
      ...coaster,
      method: "pressing",
      lengthUm: "20 cm",
      widthUm: "250",
      thicknessUm: "2,5",
      trimThousandths: "5 %",
      priceCents: "4,50",
      massMilligrams: "",
    });
    expect(read).toMatchObject({
      lengthUm: 200_000,
      widthUm: 250_000,
      thicknessUm: 2_500,
      trimThousandths: 50,
      priceCents: 450,
      massMilligrams: null,
    });
  });

  it("of a piece name what its method lacks", () => {
    expect(piece({ massMilligrams: "" })).toEqual([
      "massMilligrams: mass-or-volume",
      "volumeMm3: mass-or-volume",
    ]);
    expect(piece({ volumeMm3: "27" })).toHaveLength(2);
    expect(piece({ method: "pressing", lengthUm: "200" })).toEqual([
      "widthUm: sheet-size",
      "thicknessUm: sheet-size",
    ]);
    const sheet = { lengthUm: "200", widthUm: "250", thicknessUm: "3" };
    expect(piece({ method: "cutting", ...sheet })).toEqual(["piecesPerSheet: empty"]);
    expect(piece({ polymers: [], kinds: [] })).toEqual([
      "polymers: one-at-least",
      "kinds: one-at-least",
    ]);
  });

  it("say why a figure is none", () => {
    expect(piece({ massMilligrams: "1,234" })).toEqual(["massMilligrams: could-be-thousands"]);
    expect(piece({ massMilligrams: "0" })).toEqual(["massMilligrams: out-of-range"]);
    expect(piece({ otherCostCents: "" })).toEqual(["otherCostCents: empty"]);
    expect(piece({ mostHeatedThousandths: "120" })).toEqual([
      "mostHeatedThousandths: out-of-range",
    ]);
    expect(tool({ cavities: "1,5", gates: "0", goodThousandths: "101" })).toEqual([
      "cavities: whole-number",
      "gates: out-of-range",
      "goodThousandths: out-of-range",
    ]);
    expect(
      issuesOf(
        weighPiecesEndpoint.input.safeParse({
          requestId,
          pieceId: newId<"piece">(),
          count: "10",
          milligrams: "0.005",
        }),
      ),
    ).toEqual(["milligrams: out-of-range"]);
  });

  it("of a machine name what its method lacks", () => {
    expect(machine({ plateWidthUm: "" })).toEqual(["plateWidthUm: empty"]);
    expect(machine({ method: "moulding" })).toEqual([
      "barrelMm3: empty",
      "usableThousandths: empty",
    ]);
  });

  it("never set a machine above the polymer's ceiling, nor a polymer twice", () => {
    const set = (polymer: string, celsius: string) => ({ polymer, celsius });
    expect(machine({ setPoints: [set("PP", ""), set("PE-HD", "275")] })).toEqual([
      "setPoints.1.celsius: above-ceiling",
    ]);
    expect(machine({ setPoints: [set("PLA", "221")] })).toHaveLength(1);
    expect(machine({ setPoints: [set("PE-HD", "274"), set("PLA", "220")] })).toEqual([]);
    expect(machine({ setPoints: [set("PP", "200"), set("PP", "210")] })).toEqual([
      "setPoints: polymer-twice",
    ]);
    expect(machine({ setPoints: [{ polymer: "PVC", celsius: "180" }] })).toHaveLength(1);
    const read = addMachineEndpoint.input.parse({
      requestId,
      ...press,
      setPoints: [set("PP", ""), set("PE-HD", "190")],
    });
    expect(read.setPoints).toEqual([{ polymer: "PE-HD", celsius: 190 }]);
  });

  it("of an own density want its source, and a density that a plastic can have", () => {
    const density = (mgPerCm3: string, source: string) =>
      issuesOf(setDensityEndpoint.input.safeParse({ requestId, polymer: "PP", mgPerCm3, source }));
    expect(density("0,911", "")).toEqual(["source: empty"]);
    expect(density("9,11", "x")).toEqual(["mgPerCm3: out-of-range"]);
    expect(density("0.0911", "x")).toEqual(["mgPerCm3: too-precise"]);
    expect(density("", "")).toEqual([]);
  });
});
