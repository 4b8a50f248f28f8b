/** This month's three numbers on the front page, read from the ledger's totals. */
import "server-only";
import { dayOf, monthOf, type Month } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";

export type FrontFigures = {
  month: Month;
  collectedGrams: number;
  acceptedGrams: number;
  piecesGrams: number;
};

/** Sums over the whole scheme. Anybody may see them, so there is nothing to allow. */
export function getFrontFigures(ctx: Context): FrontFigures {
  const db = ctx.db.reader;
  const month = monthOf(dayOf(ctx.now, requireScheme(db).timeZone));
  const sums = prepared(
    db.client,
    `select coalesce(sum(collected), 0) as collectedGrams, coalesce(sum(accepted), 0) as acceptedGrams,
            coalesce(sum(pieces), 0) as piecesGrams
       from totals_month where month = ?`,
  ).get(month) as Omit<FrontFigures, "month">;
  return { month, ...sums };
}
