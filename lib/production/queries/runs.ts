/** Runs as the pages show them. */
import "server-only";
import type * as z from "zod";
import type { LabelCode } from "@/lib/core/bag-code";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { HELD_SQL } from "@/lib/stock/queries/reserved";
import type { Density, Machine, Piece, Tool } from "../contract/catalogue";
import type { listRunsEndpoint, PlanData, RunSummary } from "../contract/plans";
import { getMachine, getPiece, getTool, readDensities } from "./catalogue";
import { lotsForRun, type LotForRun } from "./lots-for-run";

const PAGE = 50;

const SUMMARY = `u.id, u.number, u.state, p.name as pieceName, p.method, u.polymer, u.wanted_pieces as wantedPieces,
  u.need_grams as needGrams, u.planned_at as plannedAt, u.folded, u.seed,
  coalesce(h.grams, 0) as reservedGrams, coalesce(h.shortGrams, 0) as shortGrams`;

/** A run with its piece and, where it has reserved something, the sums of that. */
const RUNS = `runs u join pieces p on p.id = u.piece_id
  left join (select runId, sum(grams) as grams, sum(shortGrams) as shortGrams from (${HELD_SQL}) group by runId) h
    on h.runId = u.id`;

function withColours(db: Readable, run: Omit<RunSummary, "colours">): RunSummary {
  const colours = prepared(
    db.client,
    `select c.colour_code as colourCode, k.name, k.hex, c.thousandths, c.grams
       from run_colours c join colours k on k.code = c.colour_code
      where c.run_id = ? order by c.thousandths desc, c.colour_code`,
  ).all(run.id) as RunSummary["colours"];
  return { ...run, colours };
}

/** Newest first, a page at a time. */
export function listRuns(
  ctx: Context,
  { state, after }: z.output<typeof listRunsEndpoint.input>,
): { runs: RunSummary[]; next: number | null } {
  allow(ctx, "production.read");
  return inSnapshot(ctx, (db) => {
    const found = prepared(
      db.client,
      `select ${SUMMARY} from ${RUNS}
        where (@state is null or u.state = @state) and u.number < @after order by u.number desc limit ${PAGE + 1}`,
    ).all({ state: state ?? null, after: after ?? Number.MAX_SAFE_INTEGER }) as Omit<
      RunSummary,
      "colours"
    >[];
    const runs = found.slice(0, PAGE).map((run) => withColours(db, run));
    return { runs, next: found.length > PAGE ? (runs.at(-1)?.number ?? null) : null };
  });
}

export type Reservation = {
  id: Id<"reservation">;
  lotNumber: number;
  place: string;
  colourCode: string;
  grams: number;
  shortGrams: number;
  reservedAt: Instant;
  lapsesAt: Instant;
};

export type RunPage = {
  run: RunSummary;
  plan: PlanData;
  piece: Piece;
  tool: Tool | null;
  machine: Machine | null;
  density: Density;
  labelCode: LabelCode;
  plannedByName: string;
  plannedShots: number | null;
  plannedSeconds: number;
  reservations: Reservation[];
  /** Lots that could still be reserved by hand, and lots that need a step first. */
  lots: (LotForRun & { freeGrams: number })[];
  timeZone: string;
};

/** A run with its plan, its reservations and the lots it could have; null where there is none of that number. */
export function getRunPage(ctx: Context, number: number): RunPage | null {
  allow(ctx, "production.read");
  return inSnapshot<RunPage | null>(ctx, (db) => {
    const found = prepared(
      db.client,
      `select ${SUMMARY}, u.piece_id as pieceId, u.tool_id as toolId, u.machine_id as machineId,
              u.planned_shots as plannedShots, u.planned_s as plannedSeconds, d.name as plannedByName,
              (select code from labels where kind = 'run' and subject = u.id order by made_at limit 1) as labelCode
         from ${RUNS} join people d on d.id = u.planned_by
        where u.number = ?`,
    ).get(number) as
      | (Omit<RunSummary, "colours"> & {
          pieceId: Id<"piece">;
          toolId: Id<"tool"> | null;
          machineId: Id<"machine"> | null;
          plannedShots: number | null;
          plannedSeconds: number;
          plannedByName: string;
          labelCode: LabelCode;
        })
      | undefined;
    const piece = found ? getPiece(db, found.pieceId) : null;
    const density = readDensities(db).find(({ polymer }) => polymer === found?.polymer);
    if (!found || !piece || !density) return null;
    const { pieceId, toolId, machineId, plannedShots, plannedSeconds, plannedByName, labelCode } =
      found;
    const run = withColours(db, found);
    const reservations = prepared(
      db.client,
      `select h.id, l.number as lotNumber, l.place, r.colour_code as colourCode, h.grams, h.shortGrams, h.reservedAt,
              h.lapsesAt
         from (${HELD_SQL}) h join lots l on l.id = h.lotId join materials m on m.id = l.material_id
         join rows r on r.id = m.row_id
        where h.runId = ? order by h.seq`,
    ).all(run.id) as Reservation[];
    const promised = prepared(
      db.client,
      "select coalesce(sum(grams), 0) from reservations where lot_id = ? and state = 'held'",
    ).pluck();
    return {
      run,
      plan: {
        pieceId,
        polymer: run.polymer,
        toolId,
        machineId,
        wantedPieces: run.wantedPieces,
        shares: run.colours.map(({ colourCode, thousandths }) => ({ colourCode, thousandths })),
        folded: run.folded,
        seed: run.seed,
      },
      piece,
      tool: toolId ? getTool(db, toolId) : null,
      machine: machineId ? getMachine(db, machineId) : null,
      density,
      labelCode,
      plannedByName,
      plannedShots,
      plannedSeconds,
      reservations,
      lots: lotsForRun(db, run.id).map((lot) => ({
        ...lot,
        freeGrams: Math.max(0, lot.heldGrams - (promised.get(lot.lotId) as number)),
      })),
      timeZone: requireScheme(db).timeZone,
    };
  });
}
