/** A workshop: a stock room with pieces, a tool and machines in its catalogue, and plans made of them. */
import { newId, type Id } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { addMachine } from "@/lib/production/commands/machines";
import { addPiece } from "@/lib/production/commands/pieces";
import { planRun } from "@/lib/production/commands/plan-run";
import { reserve } from "@/lib/production/commands/reserve";
import { addTool } from "@/lib/production/commands/tools";
import {
  addMachineEndpoint,
  addPieceEndpoint,
  addToolEndpoint,
} from "@/lib/production/contract/catalogue";
import { planRunEndpoint, type PlanData, type RunReceipt } from "@/lib/production/contract/plans";
import type { Reserved } from "@/lib/production/contract/reservations";
import { countLot } from "@/lib/stock/commands/count-lot";
import { promisedOf, type Promised } from "@/lib/stock/queries/reserved";
import { newScheme, NOON, type TestScheme } from "./scheme";
import { stockRoom, type StockRoom } from "./stock-room";
import { count } from "./stock-work";

/** The hook of the worked example: 40 pieces of it take 1176 g in 20 shots. */
export const HOOKS = 40;
export const HOOKS_GRAMS = 1176;

/** What a moulding run takes as it is. */
export const DRY_FLAKE = { form: "flake", wash: "dry" } as const;

type PlanInput = PlanData & { requestId: string };

export type Workshop = StockRoom & {
  /** Moulded: 26.0 g, of HDPE or PP, of lids or tubs, at most 30 % heated before. */
  hookId: Id<"piece">;
  /** Pressed: 200 × 250 × 3 mm and 5 % trim, of HDPE. */
  sheetId: Id<"piece">;
  /** Cut: 20 of 6 g out of that sheet. */
  markerId: Id<"piece">;
  /** Two cavities, sprue and runners of 4.3 g. */
  toolId: Id<"tool">;
  /** Barrel of 175 cm³, nine tenths usable, purge 50 g. */
  moulderId: Id<"machine">;
  /** Plate of 300 × 300 mm. */
  pressId: Id<"machine">;
  sawId: Id<"machine">;
  /** A plan as a client sends it: forty hooks all blue, or what is said. */
  planOf: (more?: Partial<PlanData>) => PlanInput;
  /** Saves one as the lead. */
  plan: (more?: Partial<PlanData>, at?: Instant) => RunReceipt;
  /** Reserves as the lead: oldest first, or grams of lots. */
  reserve: (run: RunReceipt, lots?: { number: number; grams: number }[], at?: Instant) => Reserved;
  /** What is promised of a lot, oldest first. */
  promised: (number: number) => Promised[];
  /** Grams promised of a lot and what of them is missing, oldest first. */
  shorts: (number: number) => [grams: number, shortGrams: number][];
  /** Dry flake into a lot of its own, opened so many days after NOON; the lots before it are closed. */
  fillAnother: (grams: number, colour?: string, days?: number) => number;
  /** The lot is counted by a lead, whatever happened to it since. */
  recount: (number: number, grams: number | "empty") => void;
};

/** A request about a run. */
export const about = <More extends object>(run: RunReceipt, more?: More) => ({
  requestId: newId(NOON),
  runId: run.id,
  ...(more as More),
});

const DAY = 24 * 60 * 60 * 1000;

const nothingOfSheet = { lengthUm: null, widthUm: null, thicknessUm: null };
const noPlate = { plateLengthUm: null, plateWidthUm: null };
const noBarrel = {
  barrelMm3: null,
  usableThousandths: null,
  leastShotMilligrams: null,
  purgeMilligrams: null,
};

/** Adds a workshop to a scheme; safe to call once a scheme. */
export function workshop(scheme: TestScheme): Workshop {
  const room = stockRoom(scheme);
  const ctx = (body: unknown, at = NOON) => room.ctx("lead", at, body);
  const piece = (data: object) => {
    const input = addPieceEndpoint.input.parse({
      requestId: newId(NOON),
      kinds: ["lids", "tubs"],
      ...nothingOfSheet,
      trimThousandths: null,
      piecesPerSheet: null,
      volumeMm3: null,
      massMilligrams: null,
      priceCents: null,
      otherCostCents: 0,
      mostHeatedThousandths: null,
      ...data,
    });
    return addPiece(ctx(input), input).id;
  };
  const machine = (data: object) => {
    const input = addMachineEndpoint.input.parse({
      requestId: newId(NOON),
      ...noPlate,
      ...noBarrel,
      ratedWatts: null,
      setPoints: [],
      ...data,
    });
    return addMachine(ctx(input), input).id;
  };
  const sheet = { lengthUm: "200", widthUm: "250", thicknessUm: "3" };
  const hookId = piece({
    name: "Coat hook",
    method: "moulding",
    polymers: ["PE-HD", "PP"],
    massMilligrams: "26.0",
    mostHeatedThousandths: "30",
  });
  const sheetId = piece({
    name: "Sheet",
    method: "pressing",
    polymers: ["PE-HD"],
    ...sheet,
    trimThousandths: "5",
  });
  const markerId = piece({
    name: "Plant label",
    method: "cutting",
    polymers: ["PE-HD"],
    ...sheet,
    piecesPerSheet: 20,
    massMilligrams: "6",
  });
  const moulderId = machine({
    name: "Hand moulder",
    method: "moulding",
    barrelMm3: "175",
    usableThousandths: "90",
    leastShotMilligrams: "10",
    purgeMilligrams: "50",
    meltSeconds: 450,
    cycleSeconds: 90,
  });
  const pressId = machine({
    name: "Press",
    method: "pressing",
    plateLengthUm: "300",
    plateWidthUm: "300",
    meltSeconds: 1200,
    cycleSeconds: 600,
  });
  const sawId = machine({ name: "Saw", method: "cutting", meltSeconds: 0, cycleSeconds: 120 });
  const tool = addToolEndpoint.input.parse({
    requestId: newId(NOON),
    name: "Hook mould",
    pieceId: hookId,
    cavities: 2,
    gates: 2,
    runnerMilligrams: "4.3",
    costCents: "240",
    preheatMinutes: 0,
    shotsBefore: 0,
    serviceAtShots: null,
    startUpShots: 0,
    goodThousandths: "100",
  });
  const toolId = addTool(ctx(tool), tool).id;
  const planOf: Workshop["planOf"] = (more = {}) =>
    planRunEndpoint.input.parse({
      requestId: newId(NOON),
      pieceId: hookId,
      polymer: "PE-HD",
      toolId,
      machineId: moulderId,
      wantedPieces: HOOKS,
      shares: [{ colourCode: "blue", thousandths: 1000 }],
      folded: 30,
      seed: 7,
      ...more,
    });
  return {
    ...room,
    hookId,
    sheetId,
    markerId,
    toolId,
    moulderId,
    pressId,
    sawId,
    planOf,
    plan: (more, at = NOON) => {
      const input = planOf(more);
      return planRun(ctx(input, at), input);
    },
    reserve: (run, lots, at = NOON) => {
      const input = { requestId: newId(at), runId: run.id, ...(lots ? { lots } : {}) };
      return reserve(ctx(input, at), input);
    },
    promised: (number) => {
      const id = scheme.db.reader.client
        .prepare("select id from lots where number = ?")
        .pluck()
        .get(number);
      return promisedOf(scheme.db.reader, id as Id<"lot">);
    },
    shorts(number) {
      return this.promised(number).map(({ grams, shortGrams }) => [grams, shortGrams]);
    },
    fillAnother: (grams, colour = "blue", days = 0) => {
      const at = instant(NOON + days * DAY);
      scheme.db.writer.client
        .prepare("update lots set closed_at = ?, closed_for = 'full' where closed_at is null")
        .run(at);
      return room.fill(grams, { ...DRY_FLAKE, colour }, 0, at);
    },
    recount: (number, grams) => {
      const input = count(room, number, grams, { confirmed: true });
      countLot(ctx(input), input);
    },
  };
}

export const newWorkshop = (): Workshop => workshop(newScheme());
