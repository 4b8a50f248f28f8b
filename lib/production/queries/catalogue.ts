/** The catalogue: small tables, read whole. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Kind } from "@/lib/core/plastics";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { Catalogue, Density, Machine, Piece, Tool } from "../contract/catalogue";
import { REFERENCE } from "../rules/reference";
import { HEATABLE, type Heatable } from "../terms";

const PIECES = `
  select id, name, method, length_um as lengthUm, width_um as widthUm, thickness_um as thicknessUm,
         trim_thousandths as trimThousandths, pieces_per_sheet as piecesPerSheet, volume_mm3 as volumeMm3,
         mass_mg as massMilligrams, weighed_mg as weighedMilligrams, weighed_pieces as weighedPieces,
         price_cents as priceCents, other_cost_cents as otherCostCents,
         most_heated_thousandths as mostHeatedThousandths, retired_at as retiredAt
    from pieces`;
const TOOLS = `
  select id, name, piece_id as pieceId, cavities, gates, runner_mg as runnerMilligrams, cost_cents as costCents,
         preheat_s / 60 as preheatMinutes, shots_before as shotsBefore, service_at_shots as serviceAtShots,
         start_up_shots as startUpShots, good_thousandths as goodThousandths, retired_at as retiredAt
    from tools`;
const MACHINES = `
  select id, name, method, plate_length_um as plateLengthUm, plate_width_um as plateWidthUm,
         barrel_mm3 as barrelMm3, usable_thousandths as usableThousandths, least_shot_mg as leastShotMilligrams,
         purge_mg as purgeMilligrams, melt_s as meltSeconds, cycle_s as cycleSeconds, rated_watts as ratedWatts,
         retired_at as retiredAt
    from machines`;

type BarePiece = Omit<Piece, "polymers" | "kinds">;
type BareMachine = Omit<Machine, "setPoints">;

function withChoices(db: Readable, piece: BarePiece): Piece {
  const polymers = prepared(db.client, "select polymer from piece_polymers where piece_id = ?")
    .pluck()
    .all(piece.id) as Heatable[];
  const kinds = prepared(db.client, "select kind from piece_kinds where piece_id = ?")
    .pluck()
    .all(piece.id) as Kind[];
  return { ...piece, polymers, kinds };
}

function withSetPoints(db: Readable, machine: BareMachine): Machine {
  const setPoints = prepared(
    db.client,
    "select polymer, celsius from set_points where machine_id = ?",
  ).all(machine.id) as Machine["setPoints"];
  return { ...machine, setPoints };
}

export function readPieces(db: Readable): Piece[] {
  const all = prepared(db.client, `${PIECES} order by name`).all() as BarePiece[];
  return all.map((piece) => withChoices(db, piece));
}

export function getPiece(db: Readable, id: Id<"piece">): Piece | null {
  const piece = prepared(db.client, `${PIECES} where id = ?`).get(id) as BarePiece | undefined;
  return piece ? withChoices(db, piece) : null;
}

export function readTools(db: Readable): Tool[] {
  return prepared(db.client, `${TOOLS} order by name`).all() as Tool[];
}

export function getTool(db: Readable, id: Id<"tool">): Tool | null {
  return (prepared(db.client, `${TOOLS} where id = ?`).get(id) as Tool | undefined) ?? null;
}

export function readMachines(db: Readable): Machine[] {
  const all = prepared(db.client, `${MACHINES} order by name`).all() as BareMachine[];
  return all.map((machine) => withSetPoints(db, machine));
}

export function getMachine(db: Readable, id: Id<"machine">): Machine | null {
  const machine = prepared(db.client, `${MACHINES} where id = ?`).get(id) as
    BareMachine | undefined;
  return machine ? withSetPoints(db, machine) : null;
}

/** Every heatable polymer's density: the scheme's own, else the reference's. */
export function readDensities(db: Readable): Density[] {
  const own = prepared(
    db.client,
    "select polymer, mg_per_cm3 as mgPerCm3, source from densities",
  ).all() as Omit<Density, "own">[];
  return HEATABLE.map((polymer): Density => {
    const found = own.find((density) => density.polymer === polymer);
    const { mgPerCm3, source } = found ?? REFERENCE[polymer];
    return { polymer, mgPerCm3, source, own: found !== undefined };
  });
}

export function getCatalogue(ctx: Context): Catalogue {
  allow(ctx, "production.read");
  return inSnapshot<Catalogue>(ctx, (db) => ({
    pieces: readPieces(db),
    tools: readTools(db),
    machines: readMachines(db),
    densities: readDensities(db),
  }));
}
