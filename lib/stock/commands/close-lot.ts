/** Closing lots: by hand, and by age. A closed lot can still be drawn, counted and moved; the next opens by itself. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { LotId } from "@/lib/core/ids";
import { dayOf, formatDay, type Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Readable, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type { closeLotEndpoint } from "../contract/lot-care";
import { requireLot } from "../queries/lot-record";
import { oldestOpening } from "../rules/lot-ends";
import type { LotEnd } from "../terms";

/**
 * Closes a lot if it is open. A step of a larger command.
 *
 * @returns whether this call closed it
 */
export function closeLotIn(tx: Tx, lotId: LotId, at: Instant, closedFor: LotEnd): boolean {
  return (
    prepared(
      tx.client,
      "update lots set closed_at = ?, closed_for = ? where id = ? and closed_at is null",
    ).run(at, closedFor, lotId).changes === 1
  );
}

/** Closes a lot of which nothing is left. A step of a larger command. */
export function closeIfEmptyIn(tx: Tx, lotId: LotId, at: Instant): boolean {
  const held = prepared(
    tx.client,
    `select coalesce(sum(b.grams), 0) from lots l join balances b on b.holder_id = l.holder_id where l.id = ?`,
  )
    .pluck()
    .get(lotId) as number;
  return held === 0 && closeLotIn(tx, lotId, at, "empty");
}

/**
 * Undo of a record that closed a lot: it takes piles again, unless the next lot of its material has opened since. A
 * step of a larger command.
 *
 * @param at when the record was written, which is when it closed the lot
 */
export function reopenLotIn(tx: Tx, lotId: LotId, at: Instant, closedFor: LotEnd): void {
  prepared(
    tx.client,
    `update lots set closed_at = null, closed_for = null
      where id = ? and closed_at = ? and closed_for = ?
        and not exists (select 1 from lots other where other.material_id = lots.material_id and other.closed_at is null)`,
  ).run(lotId, at, closedFor);
}

/**
 * Closes a lot by hand.
 *
 * @throws AppError `not-found`, `lot-closed-already`
 */
export function closeLot(
  ctx: Context,
  input: z.output<typeof closeLotEndpoint.input>,
): z.output<typeof closeLotEndpoint.output> {
  allow(ctx, "stock.edit");
  return once<z.output<typeof closeLotEndpoint.output>>(
    ctx,
    `POST /api/lots/${input.number}/close`,
    input.requestId,
    (tx) => {
      const lot = requireLot(tx, input.number);
      if (lot.closedAt !== null) {
        const when = formatDay(dayOf(lot.closedAt, requireScheme(tx).timeZone));
        throw new AppError("lot-closed-already", { number: lot.number, when });
      }
      closeLotIn(tx, lot.lotId, ctx.now, input.reason);
      recordAudit(tx, ctx, {
        action: "stock.close",
        subjectKind: "lot",
        subjectId: lot.lotId,
        fields: { number: lot.number, reason: input.reason },
      });
      return { number: lot.number, closedAt: ctx.now, closedFor: input.reason };
    },
  );
}

/** Weeks after which a lot closes; null: never. A coordinator sets it. */
export function lotWeeks(db: Readable): number | null {
  return (
    (prepared(db.client, "select lot_weeks from scheme_limits where id = 1").pluck().get() as
      number | null | undefined) ?? null
  );
}

const OLD_LOTS = "select id, number from lots where closed_at is null and opened_at <= ?";

/**
 * Closes the open lots of a material that have been open for the set weeks, so that what comes now opens the next one.
 * A step of a larger command.
 */
export function closeOldLotsOfIn(tx: Tx, now: Instant, materialId: number): void {
  const oldest = oldestOpening(lotWeeks(tx), now);
  if (oldest === null) return;
  prepared(
    tx.client,
    `update lots set closed_at = ?, closed_for = 'age'
      where material_id = ? and closed_at is null and opened_at <= ?`,
  ).run(now, materialId, oldest);
}

/**
 * The nightly job: closes every lot that has been open for the scheme's set weeks, each with its audit row.
 *
 * @returns how many it closed
 */
export function closeOldLots(ctx: Context): number {
  allow(ctx, "stock.edit");
  return inTransaction(ctx, (tx) => {
    const oldest = oldestOpening(lotWeeks(tx), ctx.now);
    if (oldest === null) return 0;
    const old = prepared(tx.client, OLD_LOTS).all(oldest) as { id: LotId; number: number }[];
    for (const { id, number } of old) {
      closeLotIn(tx, id, ctx.now, "age");
      recordAudit(tx, ctx, {
        action: "stock.close",
        subjectKind: "lot",
        subjectId: id,
        fields: { number, reason: "age" },
      });
    }
    return old.length;
  });
}
