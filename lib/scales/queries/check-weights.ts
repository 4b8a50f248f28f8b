/** Reads of check weights. */
import "server-only";
import type * as z from "zod";
import type { Id } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import type { CheckWeight, listCheckWeightsEndpoint } from "../contract/checks";

const WEIGHT = "id, name, mass_mg as massMilligrams, evidence, retired_at as retiredAt";

/** One check weight, in use or retired. */
export function getCheckWeight(db: Readable, id: Id<"check-weight">): CheckWeight | null {
  const row = prepared(db.client, `select ${WEIGHT} from check_weights where id = ?`).get(id);
  return (row as CheckWeight | undefined) ?? null;
}

/** Every check weight, retired ones last. For commands too. */
export function readCheckWeights(db: Readable): CheckWeight[] {
  const all = prepared(db.client, `select ${WEIGHT} from check_weights`).all() as CheckWeight[];
  return all.sort(
    (a, b) =>
      Number(a.retiredAt !== null) - Number(b.retiredAt !== null) ||
      a.name.localeCompare(b.name, "en", { numeric: true }),
  );
}

/** Check weights in use, by name. */
export function listCheckWeights(
  ctx: Context,
  _input: z.output<typeof listCheckWeightsEndpoint.input> = {},
): z.output<typeof listCheckWeightsEndpoint.output> {
  allow(ctx, "scales.read");
  return {
    items: readCheckWeights(ctx.db.reader).filter(({ retiredAt }) => retiredAt === null),
  };
}

/** Every check weight, retired ones last. */
export function listManagedCheckWeights(ctx: Context): CheckWeight[] {
  allow(ctx, "scales.manage");
  return readCheckWeights(ctx.db.reader);
}
