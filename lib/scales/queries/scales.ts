/** Reads of scales, containers and sacks. */
import "server-only";
import type * as z from "zod";
import type { Id, ScaleId } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import type {
  ContainerReceipt,
  listContainersEndpoint,
  listContainersSchema,
} from "../contract/containers";
import type { listScalesEndpoint, listScalesSchema, ScaleReceipt } from "../contract/scales";

/** A scale as stored; also what lib/scales/rules.ts takes. Loads in whole milligrams. */
export type Scale = ScaleReceipt;
/** A container or sack as stored. */
export type Container = ContainerReceipt;

const SCALE = `id, number, name, class, max_mg as maxMilligrams, e_mg as eMilligrams, d_mg as dMilligrams,
  stated_accuracy_mg as statedAccuracyMilligrams, retired_at as retiredAt`;
const CONTAINER = `id, kind, name, tare_mg as tareMilligrams, label_code as labelCode,
  retired_at as retiredAt`;

/** One scale, in use or retired. For commands and later areas too. */
export function getScale(db: Readable, scaleId: ScaleId): Scale | null {
  const row = prepared(db.client, `select ${SCALE} from scales where id = ?`).get(scaleId);
  return (row as Scale | undefined) ?? null;
}

/** One container or sack, in use or retired. */
export function getContainer(db: Readable, containerId: Id<"container">): Container | null {
  const row = prepared(db.client, `select ${CONTAINER} from containers where id = ?`).get(
    containerId,
  );
  return (row as Container | undefined) ?? null;
}

/** Scales in use, by number: what a capture page offers. */
export function listScales(
  ctx: Context,
  _input: z.output<typeof listScalesSchema> = {},
): z.output<typeof listScalesEndpoint.output> {
  allow(ctx, "scales.read");
  return { items: readScales(ctx.db.reader).filter((scale) => scale.retiredAt === null) };
}

/** Containers and sacks in use, by name. */
export function listContainers(
  ctx: Context,
  _input: z.output<typeof listContainersSchema> = {},
): z.output<typeof listContainersEndpoint.output> {
  allow(ctx, "scales.read");
  return { items: readContainers(ctx.db.reader).filter((one) => one.retiredAt === null) };
}

/** Every scale, retired ones last. */
export function listManagedScales(ctx: Context): Scale[] {
  allow(ctx, "scales.manage");
  return retiredLast(readScales(ctx.db.reader));
}

/** Every container and sack, retired ones last. */
export function listManagedContainers(ctx: Context): Container[] {
  allow(ctx, "scales.manage");
  return retiredLast(readContainers(ctx.db.reader));
}

function readScales(db: Readable): Scale[] {
  return prepared(db.client, `select ${SCALE} from scales order by number`).all() as Scale[];
}

function readContainers(db: Readable): Container[] {
  const all = prepared(db.client, `select ${CONTAINER} from containers`).all() as Container[];
  return all.sort((a, b) => a.name.localeCompare(b.name, "en", { numeric: true }));
}

function retiredLast<One extends { retiredAt: number | null }>(all: One[]): One[] {
  return [...all].sort((a, b) => Number(a.retiredAt !== null) - Number(b.retiredAt !== null));
}
