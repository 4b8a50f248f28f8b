/**
 * Invariant: a plan never asks for less than its pieces weigh. Every figure is rounded once, at its end: masses to the
 * milligram, what is taken out of stock up to the whole gram.
 *
 * mass = volume × density; lengths in whole micrometres, volumes in cubic millimetres, densities in milligrams a cubic
 * centimetre (0.955 g/cm³ is 955), masses in milligrams, times in seconds, shares in thousandths.
 */
import type { Method } from "../terms";

export type SheetSize = { lengthUm: number; widthUm: number; thicknessUm: number };

/** Volume of a sheet in mm³. */
export function sheetVolume({ lengthUm, widthUm, thicknessUm }: SheetSize): number {
  return (lengthUm / 1000) * (widthUm / 1000) * (thicknessUm / 1000);
}

/** Milligrams of a volume in mm³ at a density in mg/cm³. */
export function massOf(volumeMm3: number, mgPerCm3: number): number {
  return Math.round((volumeMm3 * mgPerCm3) / 1000);
}

/** How many sheets lie on a plate side by side, the better of both ways round; 0: none fits. */
export function sheetsOnPlate(
  sheet: Pick<SheetSize, "lengthUm" | "widthUm">,
  plate: { plateLengthUm: number; plateWidthUm: number },
): number {
  const laid = (length: number, width: number): number =>
    Math.floor(plate.plateLengthUm / length) * Math.floor(plate.plateWidthUm / width);
  return Math.max(laid(sheet.lengthUm, sheet.widthUm), laid(sheet.widthUm, sheet.lengthUm));
}

export type Shots = { cavities: number; goodThousandths: number; startUpShots: number };

/** shots = ceil(pieces / (cavities × good share)) + shots to begin with. */
export function shotsFor(pieces: number, tool: Shots): number {
  return Math.ceil((pieces * 1000) / (tool.cavities * tool.goodThousandths)) + tool.startUpShots;
}

export type Barrel = { barrelMm3: number; usableThousandths: number };

/** Milligrams of one fill: barrel × usable share × density of the melt. */
export function fillOf(barrel: Barrel, meltMgPerCm3: number): number {
  return Math.floor((barrel.barrelMm3 * barrel.usableThousandths * meltMgPerCm3) / 1_000_000);
}

export type Need = {
  /** What has to be taken out of stock, in whole grams, rounded up. */
  grams: number;
  /** One piece, or one sheet. */
  pieceMilligrams: number;
  /** Shots, sheets pressed, or sheets cut. */
  goes: number;
  /** Fills of a barrel, or loads of a press; 1 for cutting. */
  fills: number;
  seconds: number;
  /** Moulding: what one shot and one fill take, and what a change purges. */
  shotMilligrams: number | null;
  fillMilligrams: number | null;
  purgeMilligrams: number;
};

export type PressingInput = {
  sheet: SheetSize;
  trimThousandths: number;
  mgPerCm3: number;
  /** Good sheets weighed replace the computed mass. */
  weighedMilligrams: number | null;
  plate: { plateLengthUm: number; plateWidthUm: number } | null;
  meltSeconds: number;
  cycleSeconds: number;
};

/** n sheets: n × L × W × T × density, and the trim on top; a load of the press is what its plate takes. */
export function pressingNeed(sheets: number, input: PressingInput): Need {
  const piece = input.weighedMilligrams ?? massOf(sheetVolume(input.sheet), input.mgPerCm3);
  const perLoad = input.plate ? Math.max(1, sheetsOnPlate(input.sheet, input.plate)) : 1;
  const loads = Math.ceil(sheets / perLoad);
  return {
    grams: Math.ceil((sheets * Math.max(1, piece) * (1000 + input.trimThousandths)) / 1_000_000),
    pieceMilligrams: piece,
    goes: sheets,
    fills: loads,
    seconds: loads * (input.meltSeconds + input.cycleSeconds),
    shotMilligrams: null,
    fillMilligrams: null,
    purgeMilligrams: 0,
  };
}

export type MouldingInput = Shots & {
  pieceMilligrams: number;
  runnerMilligrams: number;
  purgeMilligrams: number;
  barrel: Barrel;
  meltMgPerCm3: number;
  preheatSeconds: number;
  meltSeconds: number;
  cycleSeconds: number;
};

/**
 * shots × (cavities × piece + sprue and runners) + purge; fills so that no shot is torn in two;
 * time = preheat + fills × melt time + shots × cycle.
 */
export function mouldingNeed(pieces: number, input: MouldingInput): Need {
  const shot = input.cavities * input.pieceMilligrams + input.runnerMilligrams;
  const fill = fillOf(input.barrel, input.meltMgPerCm3);
  const shots = shotsFor(pieces, input);
  const fills = Math.ceil(shots / Math.max(1, Math.floor(fill / shot)));
  return {
    grams: Math.ceil((shots * shot + input.purgeMilligrams) / 1000),
    pieceMilligrams: input.pieceMilligrams,
    goes: shots,
    fills,
    seconds: input.preheatSeconds + fills * input.meltSeconds + shots * input.cycleSeconds,
    shotMilligrams: shot,
    fillMilligrams: fill,
    purgeMilligrams: input.purgeMilligrams,
  };
}

export type CuttingInput = {
  sheet: SheetSize;
  mgPerCm3: number;
  piecesPerSheet: number;
  pieceMilligrams: number;
  cycleSeconds: number;
};

/** Whole sheets, as many as the pieces need. */
export function cuttingNeed(pieces: number, input: CuttingInput): Need {
  const sheets = Math.ceil(pieces / input.piecesPerSheet);
  return {
    grams: Math.ceil(
      (sheets * Math.max(1, massOf(sheetVolume(input.sheet), input.mgPerCm3))) / 1000,
    ),
    pieceMilligrams: input.pieceMilligrams,
    goes: sheets,
    fills: 1,
    seconds: sheets * input.cycleSeconds,
    shotMilligrams: null,
    fillMilligrams: null,
    purgeMilligrams: 0,
  };
}

/**
 * The most pieces for which `needOf` is still covered.
 *
 * @param covered is there enough for so many pieces? True for fewer whenever it is true for more
 * @param most the search ends there
 */
export function mostPieces(covered: (pieces: number) => boolean, most: number): number {
  let low = 0;
  let high = most;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if (covered(middle)) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** What refuses a plan outright. */
export type Unfit =
  | { why: "shot-too-large"; shotMilligrams: number; fillMilligrams: number }
  | { why: "shot-too-small"; shotMilligrams: number; leastShotMilligrams: number }
  | { why: "sheet-too-large" };

/** A shot larger than the barrel, or under the machine's least; a sheet larger than the plate. */
export function refuseFit(
  method: Method,
  need: Need,
  machine: { leastShotMilligrams: number | null } | null,
  fitsPlate: boolean,
): Unfit | null {
  if (method === "pressing" && !fitsPlate) return { why: "sheet-too-large" };
  const { shotMilligrams: shot, fillMilligrams: fill } = need;
  if (method !== "moulding" || shot === null || fill === null) return null;
  if (shot > fill) return { why: "shot-too-large", shotMilligrams: shot, fillMilligrams: fill };
  const least = machine?.leastShotMilligrams ?? 0;
  return shot < least
    ? { why: "shot-too-small", shotMilligrams: shot, leastShotMilligrams: least }
    : null;
}
