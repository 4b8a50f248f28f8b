/** One of each kind of thing that the workshop's catalogue holds. */
import { newId } from "@/lib/core/ids";
import { addMachine } from "@/lib/production/commands/machines";
import { addPiece } from "@/lib/production/commands/pieces";
import { addTool } from "@/lib/production/commands/tools";
import { NOON, type TestScheme } from "./scheme";
import type { Id } from "@/lib/core/ids";
import type { MachineData, PieceData, ToolData } from "@/lib/production/contract/catalogue";

export const coaster: PieceData = {
  name: "Coaster",
  method: "moulding",
  polymers: ["PE-HD", "PP"],
  kinds: ["lids", "bottles"],
  lengthUm: null,
  widthUm: null,
  thicknessUm: null,
  trimThousandths: null,
  piecesPerSheet: null,
  volumeMm3: null,
  massMilligrams: 26_000,
  priceCents: 450,
  otherCostCents: 60,
  mostHeatedThousandths: 300,
};
/** Its mould. */
export const mould = (pieceId: Id<"piece">): ToolData => ({
  name: "Coaster mould",
  pieceId,
  cavities: 2,
  gates: 1,
  runnerMilligrams: 4_300,
  costCents: 48_000,
  preheatMinutes: 20,
  shotsBefore: 1_240,
  serviceAtShots: 5_000,
  startUpShots: 3,
  goodThousandths: 950,
});
export const press: MachineData = {
  name: "Sheet press",
  method: "pressing",
  plateLengthUm: 600_000,
  plateWidthUm: 400_000,
  barrelMm3: null,
  usableThousandths: null,
  leastShotMilligrams: null,
  purgeMilligrams: null,
  meltSeconds: 1_800,
  cycleSeconds: 900,
  ratedWatts: 3_000,
  setPoints: [{ polymer: "PE-HD", celsius: 190 }],
};

export const asLead = (scheme: TestScheme, input: object) => scheme.ctx("lead", NOON, input);
export function addedPiece(scheme: TestScheme, data: Partial<PieceData> = {}) {
  const input = { requestId: newId(), ...coaster, ...data };
  return addPiece(asLead(scheme, input), input);
}
export function addedTool(scheme: TestScheme, name = "Coaster mould") {
  const { id } = addedPiece(scheme);
  const input = { requestId: newId(), ...mould(id), name };
  return addTool(asLead(scheme, input), input);
}
export function addedMachine(scheme: TestScheme, name = "Sheet press") {
  const input = { requestId: newId(), ...press, name };
  return addMachine(asLead(scheme, input), input);
}
