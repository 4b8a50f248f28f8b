/**
 * Invariant: browser and server plan by this one function, so that what is saved is what was shown.
 */
import type { Density, Machine, Piece, Tool } from "../contract/catalogue";
import {
  cuttingNeed,
  massOf,
  mouldingNeed,
  pressingNeed,
  refuseFit,
  sheetsOnPlate,
  sheetVolume,
  type Need,
  type SheetSize,
  type Unfit,
} from "./feedstock";
import { REFERENCE } from "./reference";

export type PlanParts = {
  piece: Piece;
  tool: Tool | null;
  machine: Machine | null;
  density: Density;
};

export type Plan =
  | { kind: "need"; need: Need }
  | { kind: "unfit"; unfit: Unfit; need: Need }
  /** A part of the catalogue that the method cannot do without. */
  | { kind: "lacks"; what: "tool" | "machine" };

/** Milligrams of one piece: weighed, else as entered, else volume × density. A sheet's own for pressing. */
export function pieceMass(piece: Piece, density: Density): number {
  if (piece.weighedMilligrams !== null) return piece.weighedMilligrams;
  if (piece.massMilligrams !== null) return piece.massMilligrams;
  const volume = piece.volumeMm3 ?? sheetVolume(sheetOf(piece));
  return massOf(volume, density.mgPerCm3);
}

/** The sheet that a piece is, or is cut from. */
export function sheetOf({ lengthUm, widthUm, thicknessUm }: Piece): SheetSize {
  return { lengthUm: lengthUm ?? 0, widthUm: widthUm ?? 0, thicknessUm: thicknessUm ?? 0 };
}

/**
 * What so many pieces need.
 *
 * @param pieces one or more; sheets where the piece is pressed
 */
export function planFor(pieces: number, parts: PlanParts): Plan {
  const { piece, tool, machine, density } = parts;
  if (piece.method === "cutting") {
    const need = cuttingNeed(pieces, {
      sheet: sheetOf(piece),
      mgPerCm3: density.mgPerCm3,
      piecesPerSheet: piece.piecesPerSheet ?? 1,
      pieceMilligrams: pieceMass(piece, density),
      cycleSeconds: machine?.cycleSeconds ?? 0,
    });
    return { kind: "need", need };
  }
  if (!machine) return { kind: "lacks", what: "machine" };
  if (piece.method === "pressing") {
    const plate =
      machine.plateLengthUm !== null && machine.plateWidthUm !== null
        ? { plateLengthUm: machine.plateLengthUm, plateWidthUm: machine.plateWidthUm }
        : null;
    const need = pressingNeed(pieces, {
      sheet: sheetOf(piece),
      trimThousandths: piece.trimThousandths ?? 0,
      mgPerCm3: density.mgPerCm3,
      weighedMilligrams: piece.weighedMilligrams,
      plate,
      meltSeconds: machine.meltSeconds,
      cycleSeconds: machine.cycleSeconds,
    });
    const fits = plate === null || sheetsOnPlate(sheetOf(piece), plate) > 0;
    const unfit = refuseFit("pressing", need, machine, fits);
    return unfit ? { kind: "unfit", unfit, need } : { kind: "need", need };
  }
  if (!tool) return { kind: "lacks", what: "tool" };
  const need = mouldingNeed(pieces, {
    cavities: tool.cavities,
    goodThousandths: tool.goodThousandths,
    startUpShots: tool.startUpShots,
    pieceMilligrams: pieceMass(piece, density),
    runnerMilligrams: tool.runnerMilligrams,
    purgeMilligrams: machine.purgeMilligrams ?? 0,
    barrel: {
      barrelMm3: machine.barrelMm3 ?? 0,
      usableThousandths: machine.usableThousandths ?? 1000,
    },
    meltMgPerCm3: REFERENCE[density.polymer].meltMgPerCm3,
    preheatSeconds: tool.preheatMinutes * 60,
    meltSeconds: machine.meltSeconds,
    cycleSeconds: machine.cycleSeconds,
  });
  const unfit = refuseFit("moulding", need, machine, true);
  return unfit ? { kind: "unfit", unfit, need } : { kind: "need", need };
}
