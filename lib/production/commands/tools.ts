/** Writes of the catalogue's tools. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { sameName, tidyName } from "@/lib/core/names";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addToolEndpoint,
  changeToolEndpoint,
  retireToolEndpoint,
  Tool,
  ToolData,
} from "../contract/catalogue";
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

/** @throws AppError `not-found` */
export function retireTool(ctx: Context, input: z.output<typeof retireToolEndpoint.input>): Tool {
  allow(ctx, "production.catalogue");
  return once<Tool>(ctx, `POST /api/tools/${input.toolId}/retire`, input.requestId, (tx) => {
    const tool = requireTool(tx, input.toolId);
    if (tool.retiredAt !== null) return tool;
    prepared(tx.client, "update tools set retired_at = ? where id = ?").run(ctx.now, tool.id);
    recordAudit(tx, ctx, {
      action: "tools.retire",
      subjectKind: "tool",
      subjectId: tool.id,
      fields: {},
    });
    return { ...tool, retiredAt: ctx.now };
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
  const taken = readTools(tx).find(
    (other) => other.id !== except && sameName(other.name, tidyName(name)),
  );
  if (taken) throw new AppError("name-in-use", { name: taken.name }, ["name"]);
}
