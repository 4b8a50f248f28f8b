/** Reads of drop-off points. */
import "server-only";
import type * as z from "zod";
import type { PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import type { listPointsEndpoint, listPointsSchema } from "./contract";
import { isBuiltIn } from "./rules";
import type { PointKind } from "./terms";

export type Point = {
  id: PointId;
  name: string;
  kind: PointKind;
  createdAt: Instant;
  closedAt: Instant | null;
};

/** What anybody may see of a point. */
export type PublicPoint = Pick<Point, "id" | "name" | "kind">;

const COLUMNS = "id, name, kind, created_at as createdAt, closed_at as closedAt";

function readAll(db: Readable): Point[] {
  const points = prepared(db.client, `select ${COLUMNS} from points`).all() as Point[];
  return points.sort((a, b) => a.name.localeCompare(b.name, "en"));
}

/** One point, open or closed. For commands and later areas too. */
export function getPoint(db: Readable, pointId: PointId): Point | null {
  const row = prepared(db.client, `select ${COLUMNS} from points where id = ?`).get(pointId);
  return (row as Point | undefined) ?? null;
}

/** The point of a bag that came without a tag. null before the scheme was set up. */
export function getBuiltInPoint(db: Readable, kind: "shed" | "not-known"): Point | null {
  const row = prepared(db.client, `select ${COLUMNS} from points where kind = ?`).get(kind);
  return (row as Point | undefined) ?? null;
}

/** Every point that a coordinator manages, closed ones last; without the built-in ones. */
export function listManagedPoints(ctx: Context): Point[] {
  allow(ctx, "points.manage");
  return readAll(ctx.db.reader)
    .filter((point) => !isBuiltIn(point.kind))
    .sort((a, b) => Number(a.closedAt !== null) - Number(b.closedAt !== null));
}

/** For lists to choose from: open points by name, the built-in ones first. */
export function listPoints(
  ctx: Context,
  _input: z.output<typeof listPointsSchema> = {},
): z.output<typeof listPointsEndpoint.output> {
  allow(ctx, "points.read");
  const open = readAll(ctx.db.reader)
    .filter((point) => point.closedAt === null)
    .map(({ id, name, kind }) => ({ id, name, kind, builtIn: isBuiltIn(kind) }));
  return { items: open.sort((a, b) => Number(b.builtIn) - Number(a.builtIn)) };
}

/** Open points for the public list. Needs no permission and gives nothing but what is on the door. */
export function listOpenPoints(ctx: Context): PublicPoint[] {
  return readAll(ctx.db.reader)
    .filter((point) => point.closedAt === null && !isBuiltIn(point.kind))
    .map(({ id, name, kind }) => ({ id, name, kind }));
}
