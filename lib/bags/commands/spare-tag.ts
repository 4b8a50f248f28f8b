/** Tags for bags that lack one: a bag that came without, and a bag whose tag is lost or unreadable. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import { newId, type BagId, type PointId } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { getBuiltInPoint, getPoint } from "@/lib/points/queries";
import { isBuiltIn } from "@/lib/points/rules";
import type {
  BagReceipt,
  giveSpareTagSchema,
  replaceTagEndpoint,
  replaceTagSchema,
} from "../contract";
import { getBagByCode, getBagById, type Bag } from "../queries";
import { isSpare } from "../rules/bag-states";
import { makeLabelIn } from "./labels";
import { moveBagIn } from "./move-bag";

/**
 * Gives a bag without a tag a spare one, at the scale: a printed tag without a point (`code`), or a new
 * code to be written on the bag. The bag then counts as picked up, "At the shed" or from "Not known".
 *
 * @throws AppError `unknown-point` for any other point, `unknown-code`, `label-in-use` for a tag that has
 *   a point or was used
 */
export function giveSpareTag(ctx: Context, input: z.output<typeof giveSpareTagSchema>): BagReceipt {
  allow(ctx, "bags.tag");
  return once(ctx, "POST /api/bags/spare", input.requestId, (tx) => {
    const pointId = requireSparePoint(tx, input.pointId);
    const bagId =
      input.code === undefined ? makeBag(tx, ctx) : requireSpare(tx, input.code, "code").id;
    prepared(tx.client, "update bags set point_id = ? where id = ?").run(pointId, bagId);
    moveBagIn(tx, bagId, "picked-up", ctx.now);
    recordAudit(tx, ctx, {
      action: "bags.spare-tag",
      subjectKind: "bag",
      subjectId: bagId,
      fields: { pointId, printed: input.code !== undefined },
    });
    return receiptOf(tx, bagId);
  });
}

/**
 * Gives a bag another tag: a printed one without a point, or a newly drawn code. The old code stays good.
 *
 * @throws AppError `unknown-code` for a code of no bag, `label-in-use` for a new one that is taken
 */
export function replaceTag(
  ctx: Context,
  input: z.output<typeof replaceTagSchema>,
): z.output<typeof replaceTagEndpoint.output> {
  allow(ctx, "bags.tag");
  return once(ctx, `POST /api/bags/${input.code}/replace-tag`, input.requestId, (tx) => {
    const bag = requireBagByCode(tx, input.code, "code");
    const newCode =
      input.newCode === undefined
        ? makeLabelIn(tx, "bag", bag.id, ctx.now)
        : handOver(tx, ctx, input.newCode, bag);
    recordAudit(tx, ctx, {
      action: "bags.replace-tag",
      subjectKind: "bag",
      subjectId: bag.id,
      fields: { newCode },
    });
    return { bag: receiptOf(tx, bag.id), newCode };
  });
}

/** A printed tag changes to another bag; the bag that it was printed for will never be, and is closed. */
function handOver(tx: Tx, ctx: Context, code: LabelCode, to: Bag): LabelCode {
  const spare = requireSpare(tx, code, "newCode");
  if (spare.id === to.id)
    throw new AppError("label-in-use", { code: formatCode(code) }, ["newCode"]);
  prepared(tx.client, "update labels set subject = ? where code = ?").run(to.id, code);
  moveBagIn(tx, spare.id, "closed", ctx.now);
  return code;
}

function makeBag(tx: Tx, ctx: Context): BagId {
  const bagId = newId<"bag">(ctx.now);
  const code = makeLabelIn(tx, "bag", bagId, ctx.now);
  prepared(
    tx.client,
    `insert into bags (id, code, point_id, order_id, state, state_since, printed_at)
     values (?, ?, null, null, 'printed', ?, ?)`,
  ).run(bagId, code, ctx.now, ctx.now);
  return bagId;
}

function requireBagByCode(tx: Tx, code: LabelCode, field: "code" | "newCode"): Bag {
  const bag = getBagByCode(tx, code);
  if (!bag) throw new AppError("unknown-code", { code: formatCode(code) }, [field]);
  return bag;
}

function requireSpare(tx: Tx, code: LabelCode, field: "code" | "newCode"): Bag {
  const bag = requireBagByCode(tx, code, field);
  // A code that was added to a bag as its second one is no spare, even while that bag is unused.
  if (!isSpare(bag) || bag.code !== code) {
    throw new AppError("label-in-use", { code: formatCode(code) }, [field]);
  }
  return bag;
}

function requireSparePoint(tx: Tx, pointId: PointId | undefined): PointId {
  const point = pointId === undefined ? getBuiltInPoint(tx, "not-known") : getPoint(tx, pointId);
  if (!point || !isBuiltIn(point.kind)) throw new AppError("unknown-point", {}, ["pointId"]);
  return point.id;
}

function receiptOf(tx: Tx, bagId: BagId): BagReceipt {
  const bag = getBagById(tx, bagId);
  if (!bag) throw new AppError("not-found");
  const { id, code, pointId, pointName, state, stateSince } = bag;
  return { id, code, pointId, pointName, state, stateSince };
}
