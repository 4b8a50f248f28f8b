/**
 * Invariant: the working shows the figures that the need was made of, in the order in which they were used, so that it
 * can be done again by hand.
 */
import { formatKg } from "@/lib/core/mass";
import { formatMeasure } from "@/lib/core/measure";
import { pieceMass, type PlanParts } from "./plan";
import { massOf, sheetVolume, type Need, type SheetSize } from "./feedstock";
import { sheetOf } from "./plan";
import { REFERENCE } from "./reference";

/** Milligrams as grams with one decimal, "143.3 g". */
export const inGrams = (milligrams: number): string => `${(milligrams / 1000).toFixed(1)} g`;

/** Seconds as "1 h 45 min", "50 min"; under a minute "40 s". */
export function duration(seconds: number): string {
  if (seconds < 60) return `${seconds} s`;
  const minutes = Math.round(seconds / 60);
  const hours = Math.floor(minutes / 60);
  if (hours === 0) return `${minutes} min`;
  return minutes % 60 === 0 ? `${hours} h` : `${hours} h ${minutes % 60} min`;
}

const minutes = (seconds: number): string => `${Number((seconds / 60).toFixed(2))} min`;

const perCm3 = (mg: number): string => `${formatMeasure(mg, "density")} g/cm³`;

/** "200 × 250 × 3 mm" */
export const sheetWords = (sheet: SheetSize): string =>
  `${[sheet.lengthUm, sheet.widthUm, sheet.thicknessUm].map((um) => formatMeasure(um, "length")).join(" × ")} mm`;

function sheetLine(sheet: SheetSize, mgPerCm3: number): string {
  const volume = sheetVolume(sheet);
  const cm3 = Number((volume / 1000).toFixed(1));
  return `${sheetWords(sheet)} = ${cm3} cm³ × ${perCm3(mgPerCm3)} = ${inGrams(massOf(volume, mgPerCm3))}`;
}

/** The lines of the working, one step each. */
export function workingOf(pieces: number, need: Need, parts: PlanParts): string[] {
  const { piece, tool, machine, density } = parts;
  const total = `${formatKg(need.grams)} kg`;
  if (piece.method === "pressing") {
    const trim = piece.trimThousandths ?? 0;
    const one =
      piece.weighedMilligrams === null
        ? sheetLine(sheetOf(piece), density.mgPerCm3)
        : `one weighed: ${inGrams(need.pieceMilligrams)}`;
    const withTrim = (need.pieceMilligrams * (1000 + trim)) / 1000;
    return [
      trim > 0 ? `${one}, with ${formatMeasure(trim, "share")} % trim ${inGrams(withTrim)}` : one,
      `${pieces} × ${inGrams(withTrim)} = ${total}`,
      ...(machine
        ? [
            `${need.fills} ${need.fills === 1 ? "load" : "loads"} × ${minutes(machine.meltSeconds + machine.cycleSeconds)} = ${duration(need.seconds)}`,
          ]
        : []),
    ];
  }
  if (piece.method === "cutting") {
    const each = massOf(sheetVolume(sheetOf(piece)), density.mgPerCm3);
    return [
      `${pieces} / ${piece.piecesPerSheet ?? 1} a sheet = ${need.goes} ${need.goes === 1 ? "sheet" : "sheets"}`,
      sheetLine(sheetOf(piece), density.mgPerCm3),
      `${need.goes} × ${inGrams(each)} = ${total}`,
    ];
  }
  if (!tool || !machine) return [];
  const good = tool.goodThousandths;
  const producing = need.goes - tool.startUpShots;
  const goodWords = good < 1000 ? ` × ${formatMeasure(good, "share")} % good` : "";
  const purge = need.purgeMilligrams;
  const melt = REFERENCE[density.polymer].meltMgPerCm3;
  return [
    ...massLine(parts),
    `${pieces} / (${tool.cavities} ${tool.cavities === 1 ? "cavity" : "cavities"}${goodWords}) = ${producing} shots`,
    ...(tool.startUpShots > 0 ? [`+ ${tool.startUpShots} to start up = ${need.goes} shots`] : []),
    `${tool.cavities} × ${inGrams(need.pieceMilligrams)} + ${inGrams(tool.runnerMilligrams)} = ${inGrams(need.shotMilligrams ?? 0)} a shot`,
    `${need.goes} × ${inGrams(need.shotMilligrams ?? 0)}${purge > 0 ? ` + ${inGrams(purge)} purge` : ""} = ${total}`,
    `${formatMeasure(machine.barrelMm3, "volume")} cm³ × ${(machine.usableThousandths ?? 1000) / 1000} × ${perCm3(melt)} = ${inGrams(need.fillMilligrams ?? 0)} a fill`,
    `${need.fills} ${need.fills === 1 ? "fill" : "fills"} × ${minutes(machine.meltSeconds)} + ${need.goes} × ${minutes(machine.cycleSeconds)}${tool.preheatMinutes > 0 ? ` + ${tool.preheatMinutes} min preheat` : ""} = ${duration(need.seconds)}`,
  ];
}

function massLine({ piece, density }: PlanParts): string[] {
  if (piece.weighedMilligrams !== null) {
    return [`${piece.weighedPieces ?? 1} pieces weighed: ${inGrams(piece.weighedMilligrams)} each`];
  }
  if (piece.volumeMm3 === null) return [];
  return [
    `${formatMeasure(piece.volumeMm3, "volume")} cm³ × ${perCm3(density.mgPerCm3)} = ${inGrams(pieceMass(piece, density))}`,
  ];
}
