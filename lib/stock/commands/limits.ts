import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { Limits, setLimitsSchema } from "../contract/limits";
import { readLimits } from "../queries/limits";

/** Sets the scheme's limits; lots that are older by then close with the next night's tidying or the next pile. */
export function setLimits(ctx: Context, input: z.output<typeof setLimitsSchema>): Limits {
  allow(ctx, "settings.manage");
  return once<Limits>(ctx, "PUT /api/settings/limits", input.requestId, (tx) => {
    const before = readLimits(tx);
    const { lotWeeks, storageKg, storageDays, reservationDays } = input;
    prepared(
      tx.client,
      `update scheme_limits set lot_weeks = ?, storage_grams = ?, storage_days = ?, reservation_days = ?
        where id = 1`,
    ).run(lotWeeks, storageKg === null ? null : storageKg * 1000, storageDays, reservationDays);
    recordAudit(tx, ctx, {
      action: "settings.limits",
      subjectKind: "settings",
      subjectId: "limits",
      fields: {
        lotWeeks,
        storageKg,
        storageDays,
        reservationDays,
        lotWeeksBefore: before.lotWeeks,
        storageKgBefore: before.storageKg,
        storageDaysBefore: before.storageDays,
        reservationDaysBefore: before.reservationDays,
      },
    });
    return { lotWeeks, storageKg, storageDays, reservationDays };
  });
}
