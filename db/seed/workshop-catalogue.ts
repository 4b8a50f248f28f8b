/** What the workshop of the story can make: pieces, their moulds, the machines, and what those are set to. */
import { uuidV7, type Id } from "@/lib/core/ids";
import type { Kind } from "@/lib/core/plastics";
import type { Instant } from "@/lib/core/time";
import { addMachine, setDensity } from "@/lib/production/commands/machines";
import { addPiece, weighPieces } from "@/lib/production/commands/pieces";
import { addTool } from "@/lib/production/commands/tools";
import type { MachineData, PieceData, ToolData } from "@/lib/production/contract/catalogue";
import type { Cast } from "./cast";
import { seeded } from "./random";

export type Workshop = {
  coaster: Id<"piece">;
  soapDish: Id<"piece">;
  plantLabel: Id<"piece">;
  hook: Id<"piece">;
  sheet: Id<"piece">;
  press: Id<"machine">;
  moulder: Id<"machine">;
  saw: Id<"machine">;
  prototype: Id<"tool">;
  coasterMould: Id<"tool">;
  soapDishMould: Id<"tool">;
  hookMould: Id<"tool">;
};

const SEED = 175_090;
const SOFT: Kind[] = ["lids", "bottles", "tubs", "regrind"];
const UNSIZED = {
  lengthUm: null,
  widthUm: null,
  thicknessUm: null,
  trimThousandths: null,
  piecesPerSheet: null,
  volumeMm3: null,
  massMilligrams: null,
};
const SHEET = { ...UNSIZED, lengthUm: 200_000, widthUm: 250_000, thicknessUm: 3_000 };

const MOULDED = { ...UNSIZED, method: "moulding" as const, kinds: SOFT };
const COASTER: PieceData = {
  ...MOULDED,
  name: "Coaster",
  polymers: ["PE-HD", "PP"],
  massMilligrams: 26_000,
  priceCents: 450,
  otherCostCents: 55,
  mostHeatedThousandths: 400,
};
const SOAP_DISH: PieceData = {
  ...MOULDED,
  name: "Soap dish",
  polymers: ["PE-HD", "PP"],
  volumeMm3: 48_000,
  priceCents: 900,
  otherCostCents: 90,
  mostHeatedThousandths: 400,
};
const HOOK: PieceData = {
  ...MOULDED,
  name: "Coat hook",
  polymers: ["PP"],
  kinds: ["lids", "tubs"],
  volumeMm3: 19_500,
  priceCents: 650,
  otherCostCents: 140,
  mostHeatedThousandths: 200,
};
const FLAT: PieceData = {
  ...SHEET,
  name: "Sheet 200 × 250 × 3",
  method: "pressing",
  polymers: ["PE-HD", "PP"],
  kinds: [...SOFT, "film"],
  trimThousandths: 50,
  priceCents: 1_200,
  otherCostCents: 180,
  mostHeatedThousandths: null,
};
const PLANT_LABEL: PieceData = {
  ...SHEET,
  name: "Plant label",
  method: "cutting",
  polymers: ["PE-HD", "PP"],
  kinds: [...SOFT, "film"],
  piecesPerSheet: 20,
  massMilligrams: 5_200,
  priceCents: 120,
  otherCostCents: 15,
  mostHeatedThousandths: null,
};

const NO_BARREL = {
  barrelMm3: null,
  usableThousandths: null,
  leastShotMilligrams: null,
  purgeMilligrams: null,
};
const PRESS: MachineData = {
  ...NO_BARREL,
  name: "Sheet press",
  method: "pressing",
  plateLengthUm: 600_000,
  plateWidthUm: 400_000,
  meltSeconds: 2_400,
  cycleSeconds: 1_500,
  ratedWatts: 3_600,
  setPoints: [
    { polymer: "PE-HD", celsius: 180 },
    { polymer: "PP", celsius: 200 },
  ],
};
const MOULDER: MachineData = {
  name: "Hand moulding machine",
  method: "moulding",
  plateLengthUm: null,
  plateWidthUm: null,
  barrelMm3: 175_000,
  usableThousandths: 900,
  leastShotMilligrams: 8_000,
  purgeMilligrams: 50_000,
  meltSeconds: 450,
  cycleSeconds: 90,
  ratedWatts: 1_200,
  setPoints: [
    { polymer: "PE-HD", celsius: 200 },
    { polymer: "PP", celsius: 220 },
    { polymer: "PS", celsius: 210 },
  ],
};
const SAW: MachineData = {
  ...NO_BARREL,
  name: "Table saw",
  method: "cutting",
  plateLengthUm: null,
  plateWidthUm: null,
  meltSeconds: 0,
  cycleSeconds: 420,
  ratedWatts: 1_100,
  setPoints: [],
};

/** The first mould is a prototype with one gate; what sells gets a mould with four cavities. */
const PROTOTYPE: Omit<ToolData, "pieceId"> = {
  name: "Coaster mould, prototype",
  cavities: 1,
  gates: 1,
  runnerMilligrams: 3_200,
  costCents: 6_000,
  preheatMinutes: 10,
  shotsBefore: 160,
  serviceAtShots: 200,
  startUpShots: 4,
  goodThousandths: 850,
};
const PRODUCTION: Omit<ToolData, "pieceId"> = {
  ...PROTOTYPE,
  name: "Coaster mould, four cavities",
  cavities: 4,
  gates: 2,
  runnerMilligrams: 7_900,
  costCents: 68_000,
  preheatMinutes: 15,
  shotsBefore: 0,
  serviceAtShots: 5_000,
  startUpShots: 3,
  goodThousandths: 960,
};
const SOAP_DISH_MOULD: Omit<ToolData, "pieceId"> = {
  ...PRODUCTION,
  name: "Soap dish mould",
  cavities: 1,
  gates: 1,
  runnerMilligrams: 5_100,
  costCents: 42_000,
  goodThousandths: 930,
};
const HOOK_MOULD: Omit<ToolData, "pieceId"> = {
  ...PRODUCTION,
  name: "Coat hook mould",
  cavities: 4,
  gates: 2,
  runnerMilligrams: 6_400,
  costCents: 54_000,
  serviceAtShots: null,
  goodThousandths: 940,
};

/** Enters the catalogue as the lead would have done before the first run. */
export function fillCatalogue(cast: Cast, at: Instant): Workshop {
  const ctx = cast.as(cast.lead, "lead", at);
  // Draws of its own: the rest of the story stays as it was.
  const random = seeded(SEED);
  const requestId = () => uuidV7(at, random.bytes(10));
  const piece = (data: PieceData) => addPiece(ctx, { requestId: requestId(), ...data }).id;
  const machine = (data: MachineData) => addMachine(ctx, { requestId: requestId(), ...data }).id;
  const tool = (pieceId: Id<"piece">, data: Omit<ToolData, "pieceId">) =>
    addTool(ctx, { requestId: requestId(), pieceId, ...data }).id;

  const coaster = piece(COASTER);
  const soapDish = piece(SOAP_DISH);
  const hook = piece(HOOK);
  // Ten of the prototype's coasters on the scale for letters.
  weighPieces(ctx, { requestId: requestId(), pieceId: coaster, count: 10, milligrams: 262_400 });
  setDensity(ctx, {
    requestId: requestId(),
    polymer: "PP",
    mgPerCm3: 908,
    source: "Own sheet of white tubs, measured and weighed",
  });
  return {
    coaster,
    soapDish,
    hook,
    sheet: piece(FLAT),
    plantLabel: piece(PLANT_LABEL),
    press: machine(PRESS),
    moulder: machine(MOULDER),
    saw: machine(SAW),
    prototype: tool(coaster, PROTOTYPE),
    coasterMould: tool(coaster, PRODUCTION),
    soapDishMould: tool(soapDish, SOAP_DISH_MOULD),
    hookMould: tool(hook, HOOK_MOULD),
  };
}
