/** A lot by the label on its container. */
import "server-only";
import type * as z from "zod";
import { getLabel } from "@/lib/bags/queries";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { LotId } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { lotByLabelEndpoint } from "../contract/lot-care";
import { bookGrams, lotOf, type LotRecord } from "./lot-record";

/**
 * The lot that a label opens: its own, or that of the container that it lies in, which may hold one open lot.
 *
 * @returns null for an unknown code, another label, or a container without an open lot
 */
export function findLotByLabel(db: Readable, code: LabelCode): LotRecord | null {
  const label = getLabel(db, code);
  if (label?.kind === "lot") return lotOf(db, label.subject as LotId);
  if (label?.kind !== "container") return null;
  const lotId = prepared(
    db.client,
    "select id from lots where container_id = ? and closed_at is null order by number desc limit 1",
  )
    .pluck()
    .get(label.subject) as LotId | undefined;
  return lotId === undefined ? null : lotOf(db, lotId);
}

/** @throws AppError `unknown-code` when the label is on no lot */
export function getLotByLabel(
  ctx: Context,
  input: z.output<typeof lotByLabelEndpoint.input>,
): z.output<typeof lotByLabelEndpoint.output> {
  allow(ctx, "stock.read");
  return inSnapshot<z.output<typeof lotByLabelEndpoint.output>>(ctx, (db) => {
    const lot = findLotByLabel(db, input.code);
    if (!lot) throw new AppError("unknown-code", { code: formatCode(input.code) }, ["code"]);
    const { number, containerId } = lot;
    return { number, containerId, heldGrams: bookGrams(db, lot) };
  });
}
