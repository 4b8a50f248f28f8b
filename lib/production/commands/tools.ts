/** Writes of the catalogue's tools. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { addToolEndpoint, changeToolEndpoint, Tool, ToolData } from "../contract/catalogue";
import { getPiece, getTool, readTools } from "../queries/catalogue";

type ToolId = Id<"tool">;

/** @throws AppError `name-in-use`, `not-found` for the piece */
export function addTool(ctx: Context, input: z.output<typeof addToolEndpoint.input>): Tool {
  allow(ctx, "production.catalogue");
  return once<Tool>(ctx, "POST /api/tools", input.requestId, (tx) => {
    const id = input.requestId as ToolId;
    requireGood(tx, input, null);
    prepared(
      tx.client,
      `insert into tools (id, name, piece_id, cavities, gates, runner_mg, cost_cents, preheat_s, shots_before,
         service_at_shots, start_up_shots, good_thousandths, created_at)
       values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    ).run(id, ...columnsOf(input), ctx.now);
    recordToolAudit(tx, ctx, "tools.add", id, input);
    return requireTool(tx, id);
  });
}

/** @throws AppError `not-found`, `name-in-use` */
export function changeTool(ctx: Context, input: z.output<typeof changeToolEndpoint.input>): Tool {
  allow(ctx, "production.catalogue");
  return once<Tool>(ctx, `PUT /api/tools/${input.toolId}`, input.requestId, (tx) => {
    const { id } = requireTool(tx, input.toolId);
    requireGood(tx, input, id);
    prepared(
      tx.client,
      `update tools set name = ?, piece_id = ?, cavities = ?, gates = ?, runner_mg = ?, cost_cents = ?, preheat_s = ?,
         shots_before = ?, service_at_shots = ?, start_up_shots = ?, good_thousandths = ? where id = ?`,
    ).run(...columnsOf(input), id);
    recordToolAudit(tx, ctx, "tools.change", id, input);
    return requireTool(tx, id);
  });
}

function columnsOf(data: ToolData) {
  return [
    tidyName(data.name),
    data.pieceId,
    data.cavities,
    data.gates,
    data.runnerMilligrams,
    data.costCents,
    data.preheatMinutes * 60,
    data.shotsBefore,
    data.serviceAtShots,
    data.startUpShots,
    data.goodThousandths,
  ] as const;
}

function recordToolAudit(
  tx: Tx,
  ctx: Context,
  action: "tools.add" | "tools.change",
  id: ToolId,
  data: ToolData,
): void {
  const { name, cavities, gates, runnerMilligrams, costCents, serviceAtShots } = data;
  recordAudit(tx, ctx, {
    action,
    subjectKind: "tool",
    subjectId: id,
    fields: { name, cavities, gates, runnerMilligrams, costCents, serviceAtShots },
  });
}

function requireTool(tx: Tx, id: ToolId): Tool {
  const tool = getTool(tx, id);
  if (!tool) throw new AppError("not-found");
  return tool;
}

function requireGood(tx: Tx, { name, pieceId }: ToolData, except: ToolId | null): void {
  if (!getPiece(tx, pieceId)) throw new AppError("not-found", {}, ["pieceId"]);
  requireFreeName(readTools(tx), name, except);
}
