import { useWatch, type Control } from "react-hook-form";
import { formatMeasure, measureSchema, type Quantity } from "@/lib/core/measure";
import type { Density, PieceData } from "@/lib/production/contract/catalogue";
import { massOf, sheetVolume } from "@/lib/production/rules/feedstock";
import { inGrams, sheetWords } from "@/lib/production/rules/working";
import { polymerName } from "./catalogue-words";
import type { PieceTyped } from "./catalogue-piece-typed";

type Props = {
  control: Control<PieceTyped, unknown, PieceData>;
  densities: readonly Density[];
};

/** Typed text as a whole number; null while it is none. */
function readOf(typed: string, quantity: Quantity, least = 1): number | null {
  const read = measureSchema(quantity, least).safeParse(typed);
  return read.success ? read.data : null;
}

/** What one piece takes by what is typed so far, polymer by polymer, with the working. */
export function CataloguePieceWorking({ control, densities }: Props) {
  const typed = useWatch({ control }) as PieceTyped;
  const lines = densities
    .filter(({ polymer }) => typed.polymers.includes(polymer))
    .flatMap((density) => linesOf(typed, density));
  const tooMany = typed.method === "cutting" && lines.some(({ beyond }) => beyond);
  if (lines.length === 0) return null;
  return (
    <div className="rounded-control bg-well px-4 py-3" aria-live="polite">
      <p className="text-sm font-bold text-soft">Working</p>
      <ul className="mt-1 grid gap-1.5">
        {lines.map(({ key, text, result }) => (
          <li key={key} className="font-mono text-sm/5">
            {text} <strong className="whitespace-nowrap">{result}</strong>
          </li>
        ))}
      </ul>
      {tooMany ? (
        <p className="mt-2 text-sm font-bold text-warn">
          That is more than the sheet weighs. Check the pieces of one sheet, and the mass of one.
        </p>
      ) : null}
    </div>
  );
}

type Line = { key: string; text: string; result: string; beyond?: boolean };

function linesOf(typed: PieceTyped, { polymer, mgPerCm3 }: Density): Line[] {
  const per = `${formatMeasure(mgPerCm3, "density")} g/cm³`;
  const name = polymerName(polymer);
  const volume = typed.by === "volume" ? readOf(typed.volumeMm3, "volume") : null;
  if (typed.method === "moulding") {
    if (volume === null) return [];
    return [
      {
        key: polymer,
        text: `${name}: ${formatMeasure(volume, "volume")} cm³ × ${per} =`,
        result: inGrams(massOf(volume, mgPerCm3)),
      },
    ];
  }
  const lengthUm = readOf(typed.lengthUm, "length");
  const widthUm = readOf(typed.widthUm, "length");
  const thicknessUm = readOf(typed.thicknessUm, "length");
  if (lengthUm === null || widthUm === null || thicknessUm === null) return [];
  const sheet = { lengthUm, widthUm, thicknessUm };
  const cm3 = Number((sheetVolume(sheet) / 1000).toFixed(1));
  const mass = massOf(sheetVolume(sheet), mgPerCm3);
  const text = `${name}: ${sheetWords(sheet)} = ${cm3} cm³ × ${per} =`;
  const trim = readOf(typed.trimThousandths, "share", 0) ?? 0;
  if (typed.method === "pressing") {
    return trim > 0
      ? [
          {
            key: polymer,
            text: `${text} ${inGrams(mass)}, with ${formatMeasure(trim, "share")} % trim`,
            result: inGrams((mass * (1000 + trim)) / 1000),
          },
        ]
      : [{ key: polymer, text, result: inGrams(mass) }];
  }
  const each =
    typed.by === "mass"
      ? readOf(typed.massMilligrams, "mass")
      : volume === null
        ? null
        : massOf(volume, mgPerCm3);
  const count = /^\d{1,5}$/.test(typed.piecesPerSheet.trim()) ? Number(typed.piecesPerSheet) : 0;
  const sheetLine = { key: polymer, text, result: inGrams(mass) };
  if (each === null || count === 0) return [sheetLine];
  return [
    sheetLine,
    {
      key: `${polymer} pieces`,
      text: `${name}: ${count} × ${inGrams(each)} out of it =`,
      result: inGrams(count * each),
      beyond: count * each > mass,
    },
  ];
}
