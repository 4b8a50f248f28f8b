/** Entries of the catalogue leave it and come back. Runs that were planned with them stay as they are. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { Machine, Piece, Tool } from "../contract/catalogue";
import type {
  retireMachineEndpoint,
  retirePieceEndpoint,
  retireToolEndpoint,
} from "../contract/retiring";
import { getMachine, getPiece, getTool } from "../queries/catalogue";

type Noun = "piece" | "tool" | "machine";
type Action<Of extends Noun> = `${Of}s.${"retire" | "restore"}`;
type Entry = { id: string; retiredAt: number | null };

/** Retiring a retired entry, and bringing one back that is there, changes nothing. */
function setRetiredIn<Of extends Noun, Found extends Entry>(
  tx: Tx,
  ctx: Context,
  noun: Of,
  action: Action<Of>,
  found: Found | null,
): Found {
  if (!found) throw new AppError("not-found");
  const retiredAt = action === `${noun}s.retire` ? ctx.now : null;
  if ((found.retiredAt === null) === (retiredAt === null)) return found;
  prepared(tx.client, `update ${noun}s set retired_at = ? where id = ?`).run(retiredAt, found.id);
  recordAudit(tx, ctx, {
    action,
    subjectKind: noun,
    subjectId: found.id,
    fields: {},
  });
  return { ...found, retiredAt };
}

/** "POST /api/tools/ID/retire": what the receipt is kept under. */
const endpointOf = (action: Action<Noun>, id: string): string =>
  `POST /api/${action.replace(".", `/${id}/`)}`;

type PieceInput = z.output<typeof retirePieceEndpoint.input>;
function setPiece(
  ctx: Context,
  action: Action<"piece">,
  { pieceId, requestId }: PieceInput,
): Piece {
  allow(ctx, "production.catalogue");
  return once<Piece>(ctx, endpointOf(action, pieceId), requestId, (tx) =>
    setRetiredIn(tx, ctx, "piece", action, getPiece(tx, pieceId)),
  );
}
/** @throws AppError `not-found` */
export const retirePiece = (ctx: Context, input: PieceInput): Piece =>
  setPiece(ctx, "pieces.retire", input);
/** @throws AppError `not-found` */
export const restorePiece = (ctx: Context, input: PieceInput): Piece =>
  setPiece(ctx, "pieces.restore", input);

type ToolInput = z.output<typeof retireToolEndpoint.input>;
function setTool(ctx: Context, action: Action<"tool">, { toolId, requestId }: ToolInput): Tool {
  allow(ctx, "production.catalogue");
  return once<Tool>(ctx, endpointOf(action, toolId), requestId, (tx) =>
    setRetiredIn(tx, ctx, "tool", action, getTool(tx, toolId)),
  );
}
/** @throws AppError `not-found` */
export const retireTool = (ctx: Context, input: ToolInput): Tool =>
  setTool(ctx, "tools.retire", input);
/** @throws AppError `not-found` */
export const restoreTool = (ctx: Context, input: ToolInput): Tool =>
  setTool(ctx, "tools.restore", input);

type MachineInput = z.output<typeof retireMachineEndpoint.input>;
function setMachine(
  ctx: Context,
  action: Action<"machine">,
  { machineId, requestId }: MachineInput,
): Machine {
  allow(ctx, "production.catalogue");
  return once<Machine>(ctx, endpointOf(action, machineId), requestId, (tx) =>
    setRetiredIn(tx, ctx, "machine", action, getMachine(tx, machineId)),
  );
}
/** @throws AppError `not-found` */
export const retireMachine = (ctx: Context, input: MachineInput): Machine =>
  setMachine(ctx, "machines.retire", input);
/** @throws AppError `not-found` */
export const restoreMachine = (ctx: Context, input: MachineInput): Machine =>
  setMachine(ctx, "machines.restore", input);
