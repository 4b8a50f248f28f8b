/** Saving a plan as a run, changing it, calling it off. Nothing moves in the ledger before a run starts. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  callOffRunEndpoint,
  changePlanEndpoint,
  PlanData,
  planRunEndpoint,
  RunReceipt,
} from "../contract/plans";
import { getMachine, getPiece, getTool, readDensities } from "../queries/catalogue";
import { gramsOfBlend } from "../rules/blend";
import type { Need } from "../rules/feedstock";
import { planFor } from "../rules/plan";
import { METHOD_NAMES } from "../terms";
import { requirePlanned } from "./require-planned";
import { releaseRunIn } from "./reserve";

type RunId = Id<"run">;

/** One site until there are more; `sites` has one row. */
const SITE = 1;

/**
 * @throws AppError `not-found`, `never-heated`, `tool-of-another-piece`, `piece-of-another-method`, `plan-lacks`,
 *   `shot-too-large`, `shot-too-small`, `sheet-too-large`, `plan-colour`
 */
export function planRun(ctx: Context, input: z.output<typeof planRunEndpoint.input>): RunReceipt {
  allow(ctx, "production.plan");
  const person = requirePerson(ctx);
  return once<RunReceipt>(ctx, "POST /api/runs", input.requestId, (tx) => {
    const id = input.requestId as RunId;
    const need = requireNeed(tx, input);
    const number = prepared(tx.client, "select coalesce(max(number), 0) + 1 from runs")
      .pluck()
      .get() as number;
    prepared(
      tx.client,
      `insert into runs (id, number, holder_id, site_id, state, piece_id, polymer, tool_id, machine_id, wanted_pieces,
         need_grams, planned_shots, planned_s, folded, seed, planned_by, planned_at)
       values (?, ?, null, ${SITE}, 'planned', ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    ).run(id, number, ...columnsOf(input, need), person, ctx.now);
    insertBlend(tx, id, input, need);
    makeLabelIn(tx, "run", id, ctx.now);
    recordRunAudit(tx, ctx, "runs.plan", id, input, need);
    return { id, number };
  });
}

/** @throws AppError as `planRun`, and `run-not-planned`, `run-reserved` */
export function changePlan(
  ctx: Context,
  input: z.output<typeof changePlanEndpoint.input>,
): RunReceipt {
  allow(ctx, "production.plan");
  return once<RunReceipt>(ctx, `PUT /api/runs/${input.runId}`, input.requestId, (tx) => {
    const run = requirePlanned(tx, input.runId);
    const reserved = prepared(
      tx.client,
      "select count(*) from reservations where run_id = ? and state = 'held'",
    )
      .pluck()
      .get(run.id) as number;
    if (reserved > 0) throw new AppError("run-reserved", { number: run.number });
    const need = requireNeed(tx, input);
    prepared(
      tx.client,
      `update runs set piece_id = ?, polymer = ?, tool_id = ?, machine_id = ?, wanted_pieces = ?, need_grams = ?,
         planned_shots = ?, planned_s = ?, folded = ?, seed = ? where id = ?`,
    ).run(...columnsOf(input, need), run.id);
    prepared(tx.client, "delete from run_colours where run_id = ?").run(run.id);
    insertBlend(tx, run.id, input, need);
    recordRunAudit(tx, ctx, "runs.change-plan", run.id, input, need);
    return { id: run.id, number: run.number };
  });
}

/**
 * Calls a planned run off; what it had reserved is free again.
 *
 * @throws AppError `not-found`, `run-not-planned`
 */
export function callOffRun(
  ctx: Context,
  input: z.output<typeof callOffRunEndpoint.input>,
): RunReceipt {
  allow(ctx, "production.plan");
  return once<RunReceipt>(ctx, `POST /api/runs/${input.runId}/call-off`, input.requestId, (tx) => {
    const run = requirePlanned(tx, input.runId);
    const released = releaseRunIn(tx, ctx, run.id, "released");
    prepared(tx.client, "update runs set state = 'called-off' where id = ?").run(run.id);
    recordAudit(tx, ctx, {
      action: "runs.call-off",
      subjectKind: "run",
      subjectId: run.id,
      fields: { releasedGrams: released },
    });
    return { id: run.id, number: run.number };
  });
}

/** Everything that refuses a plan, by the same rule as the page. */
function requireNeed(tx: Tx, input: PlanData): Need {
  const piece = getPiece(tx, input.pieceId);
  if (!piece) throw new AppError("not-found", {}, ["pieceId"]);
  requireInUse(piece, "pieceId");
  const density = readDensities(tx).find(({ polymer }) => polymer === input.polymer);
  if (!density || !piece.polymers.includes(input.polymer)) {
    throw new AppError("never-heated", { polymer: POLYMER_NAMES[input.polymer].name }, ["polymer"]);
  }
  const tool = input.toolId === null ? null : getTool(tx, input.toolId);
  if (tool && tool.pieceId !== piece.id) {
    throw new AppError("tool-of-another-piece", { tool: tool.name }, ["toolId"]);
  }
  if (tool) requireInUse(tool, "toolId");
  const machine = input.machineId === null ? null : getMachine(tx, input.machineId);
  if (machine && machine.method !== piece.method) {
    throw new AppError(
      "piece-of-another-method",
      { machine: machine.name, method: METHOD_NAMES[piece.method].toLowerCase() },
      ["machineId"],
    );
  }
  if (machine) requireInUse(machine, "machineId");
  const known = prepared(tx.client, "select 1 from colours where code = ?");
  input.shares.forEach(({ colourCode }, at) => {
    if (!known.get(colourCode)) {
      throw new AppError("plan-colour", {}, ["shares", at, "colourCode"]);
    }
  });
  const plan = planFor(input.wantedPieces, { piece, tool, machine, density });
  if (plan.kind === "lacks") {
    throw new AppError("plan-lacks", { what: plan.what }, [`${plan.what}Id`]);
  }
  if (plan.kind === "need") return plan.need;
  const { why, ...values } = plan.unfit;
  const grams = Object.fromEntries(
    Object.entries(values).map(([name, mg]) => [name, (mg / 1000).toFixed(1)]),
  );
  throw new AppError(why, grams, [why === "sheet-too-large" ? "machineId" : "toolId"]);
}

/** What left the catalogue is not planned with any more. */
function requireInUse(
  { name, retiredAt }: { name: string; retiredAt: number | null },
  field: string,
): void {
  if (retiredAt !== null) throw new AppError("not-in-catalogue", { name }, [field]);
}

function columnsOf(input: PlanData, need: Need) {
  return [
    input.pieceId,
    input.polymer,
    input.toolId,
    input.machineId,
    input.wantedPieces,
    need.grams,
    need.shotMilligrams === null ? null : need.goes,
    need.seconds,
    input.folded,
    input.seed,
  ] as const;
}

function insertBlend(tx: Tx, id: RunId, { shares }: PlanData, need: Need): void {
  const grams = gramsOfBlend(need.grams, shares);
  const insert = prepared(
    tx.client,
    "insert into run_colours (run_id, colour_code, thousandths, grams) values (?, ?, ?, ?)",
  );
  shares.forEach(({ colourCode, thousandths }, at) =>
    insert.run(id, colourCode, thousandths, grams[at] ?? 0),
  );
}

function recordRunAudit(
  tx: Tx,
  ctx: Context,
  action: "runs.plan" | "runs.change-plan",
  id: RunId,
  input: PlanData,
  need: Need,
): void {
  recordAudit(tx, ctx, {
    action,
    subjectKind: "run",
    subjectId: id,
    fields: {
      pieceId: input.pieceId,
      polymer: input.polymer,
      wantedPieces: input.wantedPieces,
      needGrams: need.grams,
      shares: input.shares
        .map(({ colourCode, thousandths }) => `${colourCode} ${thousandths / 10} %`)
        .join(", "),
    },
  });
}
