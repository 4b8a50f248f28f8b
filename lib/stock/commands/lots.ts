/** Opening lots. A material has one open lot that piles go to by themselves; the next one opens by itself. */
import "server-only";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import { AppError } from "@/lib/core/errors";
import { newId, type LotId } from "@/lib/core/ids";
import { ensureHolder } from "@/lib/ledger/commands/define";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { closeOldLotsOfIn } from "./close-lot";

export type OpenLot = {
  lotId: LotId;
  /** The ledger's holder of this lot. */
  holderId: number;
  number: number;
  /** True when this call opened it. */
  opened: boolean;
};

/** One site until there are more; `sites` has one row. */
const SITE = 1;

/**
 * The lot that takes a material: the open one that was opened first, or a new one with the next number,
 * a label of its own and a holder in the ledger. A step of a larger command, which writes the audit row.
 *
 * @param materialId from the ledger's ensureMaterial; never 1 (unsorted) or 2 (reject)
 * @param keeps lots that a corrected record had filled: what is of the same material stays where it lies, also when
 *   that lot closed since
 */
export function lotForMaterialIn(
  tx: Tx,
  ctx: Context,
  materialId: number,
  keeps: ReadonlySet<LotId> = new Set(),
): OpenLot {
  for (const kept of keeps) {
    const found = prepared(
      tx.client,
      "select id as lotId, holder_id as holderId, number from lots where id = ? and material_id = ?",
    ).get(kept, materialId) as Omit<OpenLot, "opened"> | undefined;
    if (found) return { ...found, opened: false };
  }
  closeOldLotsOfIn(tx, ctx.now, materialId);
  const open = prepared(
    tx.client,
    `select id as lotId, holder_id as holderId, number from lots
      where material_id = ? and closed_at is null order by number limit 1`,
  ).get(materialId) as Omit<OpenLot, "opened"> | undefined;
  return open ? { ...open, opened: false } : openLotIn(tx, ctx, materialId);
}

/**
 * A new lot of a material, whether or not another is open. A step of a larger command.
 *
 * @param place where it stands; "" when nobody said
 */
export function openLotIn(tx: Tx, ctx: Context, materialId: number, place = ""): OpenLot {
  const lotId = newId<"lot">(ctx.now);
  const code = makeLabelIn(tx, "lot", lotId, ctx.now);
  const holderId = ensureHolder(tx, "lot", code);
  const number = prepared(tx.client, "select coalesce(max(number), 0) + 1 from lots")
    .pluck()
    .get() as number;
  prepared(
    tx.client,
    `insert into lots (id, number, holder_id, material_id, site_id, place, opened_at)
     values (?, ?, ?, ?, ?, ?, ?)`,
  ).run(lotId, number, holderId, materialId, SITE, place, ctx.now);
  return { lotId, holderId, number, opened: true };
}

/**
 * The lot that somebody chose for a material.
 *
 * @param path of the choice in the input
 * @param keeps lots that may be named though they are closed: those that a corrected record had filled
 * @throws AppError `lot-closed`, `lot-other-material`
 */
export function chosenLotIn(
  tx: Tx,
  number: number,
  materialId: number,
  path: readonly (string | number)[],
  keeps: ReadonlySet<LotId> = new Set(),
): OpenLot {
  const found = prepared(
    tx.client,
    `select id as lotId, holder_id as holderId, number, material_id as materialId, closed_at as closedAt
      from lots where number = ?`,
  ).get(number) as
    (Omit<OpenLot, "opened"> & { materialId: number; closedAt: number | null }) | undefined;
  if (!found || (found.closedAt !== null && !keeps.has(found.lotId))) {
    throw new AppError("lot-closed", { lot: number }, path);
  }
  if (found.materialId !== materialId) {
    throw new AppError("lot-other-material", { lot: number }, path);
  }
  const { lotId, holderId } = found;
  return { lotId, holderId, number, opened: false };
}
