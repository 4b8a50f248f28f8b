/** Reads of tags and bags. */
import "server-only";
import type { LabelCode } from "@/lib/core/bag-code";
import type { BagId, Id, PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { PointKind } from "@/lib/points/terms";
import type { BagState, LabelKind } from "./terms";

export type Bag = {
  id: BagId;
  /** The bag's first code: the ledger's name of it. */
  code: LabelCode;
  pointId: PointId | null;
  pointName: string | null;
  pointKind: PointKind | null;
  state: BagState;
  stateSince: Instant;
  printedAt: Instant;
};

const BAG = `bags.id, bags.code, bags.point_id as pointId, points.name as pointName,
  points.kind as pointKind, bags.state, bags.state_since as stateSince, bags.printed_at as printedAt`;

/** The bag that a code opens, whichever of its tags it is on. null for an unknown code or another label. */
export function getBagByCode(db: Readable, code: LabelCode): Bag | null {
  const row = prepared(
    db.client,
    `select ${BAG} from labels
       join bags on bags.id = labels.subject
       left join points on points.id = bags.point_id
      where labels.code = ? and labels.kind = 'bag'`,
  ).get(code);
  return (row as Bag | undefined) ?? null;
}

export function getBagById(db: Readable, bagId: BagId): Bag | null {
  const row = prepared(
    db.client,
    `select ${BAG} from bags left join points on points.id = bags.point_id where bags.id = ?`,
  ).get(bagId);
  return (row as Bag | undefined) ?? null;
}

/** Every code that opens a bag, its first one first. */
export function listCodesOfBag(db: Readable, bag: Pick<Bag, "id" | "code">): LabelCode[] {
  return prepared(
    db.client,
    `select code from labels where kind = 'bag' and subject = ?
      order by code <> ?, made_at, code`,
  )
    .pluck()
    .all(bag.id, bag.code) as LabelCode[];
}

/** What a scanned label stands for: a bag, lot, container, run or batch. */
export function getLabel(
  db: Readable,
  code: LabelCode,
): { kind: LabelKind; subject: string } | null {
  const row = prepared(db.client, "select kind, subject from labels where code = ?").get(code);
  return (row as { kind: LabelKind; subject: string } | undefined) ?? null;
}

export type PublicBag = Pick<Bag, "code" | "pointName" | "pointKind" | "state" | "stateSince">;

/** A scanned label for anybody: a bag with what may be known of it, or that it belongs to something else. */
export type PublicLabel = { kind: "bag"; bag: PublicBag } | { kind: Exclude<LabelKind, "bag"> };

/** What anybody who scans a label may see. Needs no permission; holds nothing of a person. */
export function getPublicLabel(ctx: Context, code: LabelCode): PublicLabel | null {
  return inSnapshot(ctx, (db): PublicLabel | null => {
    const label = getLabel(db, code);
    if (!label) return null;
    if (label.kind !== "bag") return { kind: label.kind };
    const bag = getBagByCode(db, code);
    if (!bag) return null;
    const { pointName, pointKind, state, stateSince } = bag;
    return { kind: "bag", bag: { code: bag.code, pointName, pointKind, state, stateSince } };
  });
}

export type TagOrder = {
  id: Id<"tag-order">;
  count: number;
  pointId: PointId | null;
  pointName: string | null;
  orderedAt: Instant;
  /** Tags of the order that nobody has used yet. */
  unused: number;
};

/** Orders on one page of the list. */
export const ORDERS_PER_PAGE = 50;

const ORDER = `tag_orders.id, tag_orders.count, tag_orders.point_id as pointId, points.name as pointName,
  tag_orders.ordered_at as orderedAt,
  (select count(*) from bags where order_id = tag_orders.id and state = 'printed') as unused`;

/**
 * Tag orders, newest first, a page at a time.
 *
 * @param after the last order of the page before; without it, the newest
 */
export function listTagOrders(ctx: Context, after?: Id<"tag-order">): TagOrder[] {
  allow(ctx, "tags.order");
  // The id decides between orders of one instant, so that none falls between two pages.
  const older = `where (tag_orders.ordered_at, tag_orders.id) <
      (select one.ordered_at, one.id from tag_orders one where one.id = @after)`;
  return prepared(
    ctx.db.reader.client,
    `select ${ORDER} from tag_orders left join points on points.id = tag_orders.point_id
      ${after === undefined ? "" : older}
      order by tag_orders.ordered_at desc, tag_orders.id desc limit ${ORDERS_PER_PAGE}`,
  ).all(...(after === undefined ? [] : [{ after }])) as TagOrder[];
}

export type TagOrderSheet = { order: TagOrder; codes: LabelCode[] };

/** An order with the codes to print, in alphabetical order, so that one is found again. null when there is none. */
export function getTagOrderSheet(ctx: Context, orderId: string): TagOrderSheet | null {
  allow(ctx, "tags.order");
  return inSnapshot(ctx, (db) => {
    const order = prepared(
      db.client,
      `select ${ORDER} from tag_orders left join points on points.id = tag_orders.point_id
        where tag_orders.id = ?`,
    ).get(orderId) as TagOrder | undefined;
    if (!order) return null;
    const codes = prepared(db.client, "select code from bags where order_id = ? order by code")
      .pluck()
      .all(orderId) as LabelCode[];
    return { order, codes };
  });
}

/** The bags of an order with their states, in the order of the printed sheet. */
export function listBagsOfOrder(ctx: Context, orderId: Id<"tag-order">): Bag[] {
  allow(ctx, "tags.order");
  return prepared(
    ctx.db.reader.client,
    `select ${BAG} from bags left join points on points.id = bags.point_id
      where bags.order_id = ? order by bags.code`,
  ).all(orderId) as Bag[];
}

/** How many printed tags belong to no point yet and may be given to bags without one. */
export function countSpareTags(ctx: Context): number {
  allow(ctx, "bags.read");
  return prepared(
    ctx.db.reader.client,
    "select count(*) from bags where state = 'printed' and point_id is null",
  )
    .pluck()
    .get() as number;
}
