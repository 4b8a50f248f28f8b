/** Parts of a catalogue for tests of the rules: the moulded hook of the worked example, a sheet, a cut label. */
import { newId } from "@/lib/core/ids";
import type { Density, Machine, Piece, Tool } from "@/lib/production/contract/catalogue";
import type { ColourStock, PlanStock } from "@/lib/production/contract/plans";
import { REFERENCE } from "@/lib/production/rules/reference";
import type { Heatable } from "@/lib/production/terms";

export const piece = (more: Partial<Piece> = {}): Piece => ({
  id: newId(0),
  name: "Coat hook",
  method: "moulding",
  polymers: ["PE-HD"],
  kinds: ["lids"],
  lengthUm: null,
  widthUm: null,
  thicknessUm: null,
  trimThousandths: null,
  piecesPerSheet: null,
  volumeMm3: null,
  massMilligrams: 26_000,
  weighedMilligrams: null,
  weighedPieces: null,
  priceCents: 650,
  otherCostCents: 120,
  mostHeatedThousandths: null,
  retiredAt: null,
  ...more,
});

const SHEET = { lengthUm: 200_000, widthUm: 250_000, thicknessUm: 3_000, massMilligrams: null };

export const sheet = (more: Partial<Piece> = {}): Piece =>
  piece({ name: "Sheet", method: "pressing", ...SHEET, trimThousandths: 50, ...more });

export const label = (more: Partial<Piece> = {}): Piece =>
  piece({
    name: "Plant label",
    method: "cutting",
    ...SHEET,
    piecesPerSheet: 20,
    massMilligrams: 6_000,
    ...more,
  });

export const tool = (more: Partial<Tool> = {}): Tool => ({
  id: newId(0),
  name: "Hook mould",
  pieceId: newId(0),
  cavities: 2,
  gates: 2,
  runnerMilligrams: 4_300,
  costCents: 24_000,
  preheatMinutes: 0,
  shotsBefore: 0,
  serviceAtShots: null,
  startUpShots: 0,
  goodThousandths: 1000,
  retiredAt: null,
  ...more,
});

const bare = {
  plateLengthUm: null,
  plateWidthUm: null,
  barrelMm3: null,
  usableThousandths: null,
  leastShotMilligrams: null,
  purgeMilligrams: null,
  ratedWatts: null,
  setPoints: [],
  retiredAt: null,
};

/** Seven and a half minutes to melt a fill, one and a half for a shot. */
export const moulder = (more: Partial<Machine> = {}): Machine => ({
  ...bare,
  id: newId(0),
  name: "Hand moulder",
  method: "moulding",
  barrelMm3: 175_000,
  usableThousandths: 900,
  leastShotMilligrams: 10_000,
  purgeMilligrams: 50_000,
  meltSeconds: 450,
  cycleSeconds: 90,
  ...more,
});

export const press = (more: Partial<Machine> = {}): Machine => ({
  ...bare,
  id: newId(0),
  name: "Press",
  method: "pressing",
  plateLengthUm: 300_000,
  plateWidthUm: 300_000,
  meltSeconds: 1200,
  cycleSeconds: 600,
  ...more,
});

export const density = (polymer: Heatable = "PE-HD"): Density => ({
  polymer,
  mgPerCm3: REFERENCE[polymer].mgPerCm3,
  source: REFERENCE[polymer].source,
  own: false,
});

export const colour = (code: string, freeGrams: number, more: Partial<ColourStock> = {}) => ({
  code,
  name: code,
  hex: "#1f46d6",
  look: "solid" as const,
  freeGrams,
  reservedGrams: 0,
  heatedGrams: 0,
  kinds: ["lids" as const],
  afterSteps: [],
  weeks: [],
  ...more,
});

export const stock = (colours: ColourStock[], keepsThousandths = 1000): PlanStock => ({
  colours,
  keepsThousandths,
  today: "2026-05-06",
});
