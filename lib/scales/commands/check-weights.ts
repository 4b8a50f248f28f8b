/** Writes of check weights: objects whose mass is known. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addCheckWeightEndpoint,
  CheckWeight,
  retireCheckWeightEndpoint,
} from "../contract/checks";
import { getCheckWeight, readCheckWeights } from "../queries/check-weights";

/**
 * Adds a check weight. Its mass is never changed: a weight that was weighed anew is another one.
 *
 * @throws AppError `name-in-use`
 */
export function addCheckWeight(
  ctx: Context,
  input: z.output<typeof addCheckWeightEndpoint.input>,
): CheckWeight {
  allow(ctx, "scales.manage");
  return once(ctx, "POST /api/check-weights", input.requestId, (tx) => {
    const id = input.requestId as Id<"check-weight">;
    const { massMilligrams, evidence } = input;
    const name = tidyName(input.name);
    requireFreeName(readCheckWeights(tx), name);
    prepared(
      tx.client,
      `insert into check_weights (id, name, mass_mg, evidence, created_at, retired_at)
       values (?, ?, ?, ?, ?, null)`,
    ).run(id, name, massMilligrams, evidence, ctx.now);
    recordAudit(tx, ctx, {
      action: "check-weights.add",
      subjectKind: "check-weight",
      subjectId: id,
      fields: { massMilligrams },
      personal: { name, evidence },
    });
    return { id, name, massMilligrams, evidence, retiredAt: null };
  });
}

/**
 * Takes a check weight out of the list; its checks stay. Retiring a retired one changes nothing.
 *
 * @throws AppError `not-found`
 */
export function retireCheckWeight(
  ctx: Context,
  input: z.output<typeof retireCheckWeightEndpoint.input>,
): CheckWeight {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/check-weights/${input.checkWeightId}/retire`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.checkWeightId, ctx.now, "check-weights.retire"),
  );
}

/**
 * Brings a retired check weight back into the list.
 *
 * @throws AppError `not-found`
 */
export function restoreCheckWeight(
  ctx: Context,
  input: z.output<typeof retireCheckWeightEndpoint.input>,
): CheckWeight {
  allow(ctx, "scales.manage");
  return once(
    ctx,
    `POST /api/check-weights/${input.checkWeightId}/restore`,
    input.requestId,
    (tx) => setRetiredIn(tx, ctx, input.checkWeightId, null, "check-weights.restore"),
  );
}

function setRetiredIn(
  tx: Tx,
  ctx: Context,
  id: Id<"check-weight">,
  retiredAt: Instant | null,
  action: "check-weights.retire" | "check-weights.restore",
): CheckWeight {
  const weight = getCheckWeight(tx, id);
  if (!weight) throw new AppError("not-found");
  if ((weight.retiredAt === null) === (retiredAt === null)) return weight;
  prepared(tx.client, "update check_weights set retired_at = ? where id = ?").run(retiredAt, id);
  recordAudit(tx, ctx, { action, subjectKind: "check-weight", subjectId: id, fields: {} });
  return { ...weight, retiredAt };
}
