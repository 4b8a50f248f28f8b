/** Writes of scales. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { ScaleId } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addScaleSchema,
  changeScaleSchema,
  retireScaleSchema,
  ScaleData,
  ScaleReceipt,
} from "../contract/scales";
import { getScale, type Scale } from "../queries/scales";
import { checkScale, problemValues, specOf, type ScaleSpec } from "../rules/scale";

/** One site until there are more; `sites` has one row. */
const SITE = 1;

/**
 * Adds a scale and gives it the next number, under which the ledger knows it for good.
 *
 * @throws AppError `name-in-use`, `scale-step`, `scale-max`, `scale-interval`, `scale-intervals`
 */
export function addScale(ctx: Context, input: z.output<typeof addScaleSchema>): ScaleReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, "POST /api/scales", input.requestId, (tx) => {
    const id = input.requestId as ScaleId;
    const name = tidyName(input.name);
    const spec = requireSound(input);
    requireFreeName(namesOf(tx), name, null);
    prepared(
      tx.client,
      `insert into scales (id, number, name, site_id, class, max_mg, e_mg, d_mg, stated_accuracy_mg,
         created_at, retired_at)
       values (?, (select coalesce(max(number), 0) + 1 from scales), ?, ?, ?, ?, ?, ?, ?, ?, null)`,
    ).run(id, name, SITE, ...columnsOf(spec), ctx.now);
    recordScaleAudit(tx, ctx, "scales.add", id, spec, name);
    return requireScale(tx, id);
  });
}

/**
 * Changes a scale's data. Readings already saved keep the error that they were saved with.
 *
 * @throws AppError `not-found` and those of {@link addScale}
 */
export function changeScale(ctx: Context, input: z.output<typeof changeScaleSchema>): ScaleReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `PUT /api/scales/${input.scaleId}`, input.requestId, (tx) => {
    const { id } = requireScale(tx, input.scaleId);
    const name = tidyName(input.name);
    const spec = requireSound(input);
    requireFreeName(namesOf(tx), name, id);
    prepared(
      tx.client,
      `update scales set name = ?, class = ?, max_mg = ?, e_mg = ?, d_mg = ?, stated_accuracy_mg = ?
        where id = ?`,
    ).run(name, ...columnsOf(spec), id);
    recordScaleAudit(tx, ctx, "scales.change", id, spec, name);
    return requireScale(tx, id);
  });
}

/**
 * Takes a scale out of the lists; its readings stay. Retiring a retired one changes nothing.
 *
 * @throws AppError `not-found`
 */
export function retireScale(ctx: Context, input: z.output<typeof retireScaleSchema>): ScaleReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/scales/${input.scaleId}/retire`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.scaleId, ctx.now, "scales.retire"),
  );
}

/**
 * Brings a retired scale back into the lists.
 *
 * @throws AppError `not-found`
 */
export function restoreScale(
  ctx: Context,
  input: z.output<typeof retireScaleSchema>,
): ScaleReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/scales/${input.scaleId}/restore`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.scaleId, null, "scales.restore"),
  );
}

function setRetiredIn(
  tx: Tx,
  ctx: Context,
  scaleId: ScaleId,
  retiredAt: Instant | null,
  action: "scales.retire" | "scales.restore",
): ScaleReceipt {
  const scale = requireScale(tx, scaleId);
  if ((scale.retiredAt === null) === (retiredAt === null)) return scale;
  prepared(tx.client, "update scales set retired_at = ? where id = ?").run(retiredAt, scaleId);
  recordAudit(tx, ctx, { action, subjectKind: "scale", subjectId: scaleId, fields: {} });
  return { ...scale, retiredAt };
}

function requireScale(tx: Tx, scaleId: ScaleId): Scale {
  const scale = getScale(tx, scaleId);
  if (!scale) throw new AppError("not-found");
  return scale;
}

function requireSound(data: ScaleData): ScaleSpec {
  const spec = specOf(data);
  const problem = checkScale(spec);
  if (problem) throw new AppError(problem.code, problemValues(problem), [problem.field]);
  return spec;
}

function columnsOf(spec: ScaleSpec) {
  return [
    spec.class,
    spec.maxMilligrams,
    spec.eMilligrams,
    spec.dMilligrams,
    spec.statedAccuracyMilligrams,
  ] as const;
}

function recordScaleAudit(
  tx: Tx,
  ctx: Context,
  action: "scales.add" | "scales.change",
  id: ScaleId,
  spec: ScaleSpec,
  name: string,
): void {
  recordAudit(tx, ctx, {
    action,
    subjectKind: "scale",
    subjectId: id,
    fields: spec,
    personal: { name },
  });
}

const namesOf = (tx: Tx): { id: string; name: string }[] =>
  prepared(tx.client, "select id, name from scales").all() as { id: string; name: string }[];
