/** Writes of drop-off points. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { newId, type PointId } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { addPointSchema, changePointSchema, closePointSchema, PointReceipt } from "./contract";
import { getPoint, type Point } from "./queries";
import { BUILT_IN_POINTS, isBuiltIn } from "./rules";

/**
 * Adds a drop-off point.
 *
 * @throws AppError `name-in-use` when another point, open or closed, has the name
 */
export function addPoint(ctx: Context, input: z.output<typeof addPointSchema>): PointReceipt {
  allow(ctx, "points.manage");
  return once(ctx, "POST /api/points", input.requestId, (tx) => {
    const id = input.requestId as PointId;
    const name = tidyName(input.name);
    requireFreeName(namesOf(tx), name, null);
    prepared(
      tx.client,
      "insert into points (id, name, kind, created_at, closed_at) values (?, ?, ?, ?, null)",
    ).run(id, name, input.kind, ctx.now);
    recordAudit(tx, ctx, {
      action: "points.add",
      subjectKind: "point",
      subjectId: id,
      fields: { kind: input.kind },
      personal: { name },
    });
    return { id, name, kind: input.kind, closedAt: null };
  });
}

/**
 * Gives a point another name or kind. Its bags and figures keep pointing to it.
 *
 * @throws AppError `not-found`, `point-built-in`, `name-in-use`
 */
export function changePoint(ctx: Context, input: z.output<typeof changePointSchema>): PointReceipt {
  allow(ctx, "points.manage");
  return once(ctx, `PATCH /api/points/${input.pointId}`, input.requestId, (tx) => {
    const point = requireChangeable(tx, input.pointId);
    const name = tidyName(input.name);
    requireFreeName(namesOf(tx), name, point.id);
    prepared(tx.client, "update points set name = ?, kind = ? where id = ?").run(
      name,
      input.kind,
      point.id,
    );
    recordAudit(tx, ctx, {
      action: "points.change",
      subjectKind: "point",
      subjectId: point.id,
      fields: { kind: input.kind, kindBefore: point.kind },
      personal: { name, nameBefore: point.name },
    });
    return { id: point.id, name, kind: input.kind, closedAt: point.closedAt };
  });
}

/**
 * Closes a point. Closing a closed one changes nothing.
 *
 * @throws AppError `not-found`, `point-built-in`
 */
export function closePoint(ctx: Context, input: z.output<typeof closePointSchema>): PointReceipt {
  allow(ctx, "points.manage");
  return once(ctx, `POST /api/points/${input.pointId}/close`, input.requestId, (tx) =>
    setClosedIn(tx, ctx, input.pointId, ctx.now, "points.close"),
  );
}

/**
 * Opens a closed point again.
 *
 * @throws AppError `not-found`, `point-built-in`
 */
export function reopenPoint(ctx: Context, input: z.output<typeof closePointSchema>): PointReceipt {
  allow(ctx, "points.manage");
  return once(ctx, `POST /api/points/${input.pointId}/reopen`, input.requestId, (tx) =>
    setClosedIn(tx, ctx, input.pointId, null, "points.reopen"),
  );
}

/** A step of the scheme's first set-up: makes the two built-in points where they are missing. */
export function setUpPointsIn(tx: Tx, ctx: Context, now: Instant): void {
  for (const { kind, name } of BUILT_IN_POINTS) {
    const known = prepared(tx.client, "select 1 from points where kind = ?").get(kind);
    if (known) continue;
    const id = newId<"point">(now);
    prepared(
      tx.client,
      "insert into points (id, name, kind, created_at, closed_at) values (?, ?, ?, ?, null)",
    ).run(id, name, kind, now);
    recordAudit(tx, ctx, {
      action: "points.set-up",
      subjectKind: "point",
      subjectId: id,
      fields: { kind },
    });
  }
}

function setClosedIn(
  tx: Tx,
  ctx: Context,
  pointId: PointId,
  closedAt: Instant | null,
  action: "points.close" | "points.reopen",
): PointReceipt {
  const { id, name, kind, closedAt: before } = requireChangeable(tx, pointId);
  if ((before === null) === (closedAt === null)) return { id, name, kind, closedAt: before };
  prepared(tx.client, "update points set closed_at = ? where id = ?").run(closedAt, id);
  recordAudit(tx, ctx, { action, subjectKind: "point", subjectId: id, fields: {} });
  return { id, name, kind, closedAt };
}

function requireChangeable(tx: Tx, pointId: PointId): Point {
  const point = getPoint(tx, pointId);
  if (!point) throw new AppError("not-found");
  if (isBuiltIn(point.kind)) throw new AppError("point-built-in", { name: point.name });
  return point;
}

const namesOf = (tx: Tx): { id: string; name: string }[] =>
  prepared(tx.client, "select id, name from points").all() as { id: string; name: string }[];
