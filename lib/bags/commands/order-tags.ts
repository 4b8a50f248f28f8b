import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { newId, type Id, type PointId } from "@/lib/core/ids";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { getPoint } from "@/lib/points/queries";
import { isBuiltIn } from "@/lib/points/rules";
import type { orderTagsSchema, TagOrderReceipt } from "../contract";
import { makeLabelIn } from "./labels";

/**
 * Draws the codes of new tags and makes their bags, in state "printed". All or none.
 *
 * @throws AppError `unknown-point` for a missing, closed or built-in point
 */
export function orderTags(ctx: Context, input: z.output<typeof orderTagsSchema>): TagOrderReceipt {
  allow(ctx, "tags.order");
  const orderedBy = requirePerson(ctx);
  return once(ctx, "POST /api/tag-orders", input.requestId, (tx) => {
    const id = input.requestId as Id<"tag-order">;
    const { count, pointId } = input;
    if (pointId !== null) requireOpenPoint(tx, pointId);
    prepared(
      tx.client,
      "insert into tag_orders (id, point_id, count, ordered_by, ordered_at) values (?, ?, ?, ?, ?)",
    ).run(id, pointId, count, orderedBy, ctx.now);
    const insertBag = prepared(
      tx.client,
      `insert into bags (id, code, point_id, order_id, state, state_since, printed_at)
       values (?, ?, ?, ?, 'printed', ?, ?)`,
    );
    for (let made = 0; made < count; made += 1) {
      const bagId = newId<"bag">(ctx.now);
      const code = makeLabelIn(tx, "bag", bagId, ctx.now);
      insertBag.run(bagId, code, pointId, id, ctx.now, ctx.now);
    }
    recordAudit(tx, ctx, {
      action: "tags.order",
      subjectKind: "tag-order",
      subjectId: id,
      fields: { count, pointId },
    });
    return { id, count, pointId, orderedAt: ctx.now };
  });
}

function requireOpenPoint(tx: Tx, pointId: PointId): void {
  const point = getPoint(tx, pointId);
  if (!point || point.closedAt !== null || isBuiltIn(point.kind)) {
    throw new AppError("unknown-point", {}, ["pointId"]);
  }
}
