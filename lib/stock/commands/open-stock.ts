/** What stood in the shed on the scheme's first day, by a signed count sheet. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { dayOf } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type { CountReceipt, OpenStockInput } from "../contract/counts";
import { requireColourInUse } from "../queries/palette";
import { lotOf } from "../queries/lot-record";
import { openLotIn } from "./lots";
import { postCountIn, readFound } from "./post-count";

/**
 * One new lot with what was counted into it; its origin is unknown. Each lot is counted in once, because it is made by
 * it, and only on the scheme's first day.
 *
 * @throws AppError `opening-refused` on any later day, `unknown-colour`, and what a weighing throws
 */
export function openStock(ctx: Context, input: OpenStockInput): CountReceipt {
  allow(ctx, "stock.opening");
  const person = requirePerson(ctx);
  return once<CountReceipt>(ctx, "POST /api/stock/openings", input.requestId, (tx) => {
    const { firstDay, timeZone } = requireScheme(tx);
    if (dayOf(ctx.now, timeZone) !== firstDay) throw new AppError("opening-refused");
    // A phone whose clock shows another day has weighed now.
    const claimed = input.occurredAt <= ctx.now ? input.occurredAt : ctx.now;
    const occurredAt = dayOf(claimed, timeZone) === firstDay ? claimed : ctx.now;
    requireColourInUse(tx, input.colourCode, ["colourCode"]);
    const { scaleId, readings } = input;
    const found = readFound(tx, { found: "weighed", scaleId, readings }, occurredAt, []);
    const { polymer, kind, colourCode, form, wash } = input;
    const materialId = ensureMaterial(tx, { polymer, kind, colourCode, form, wash });
    const opened = openLotIn(tx, ctx, materialId, input.place);
    const posted = postCountIn(tx, ctx, {
      countId: input.requestId as Id<"count">,
      kind: "opening",
      lot: lotOf(tx, opened.lotId),
      found,
      occurredAt,
      sheet: input.sheet,
      reviewedBy: person,
    });
    recordAudit(tx, ctx, {
      action: "stock.opening",
      subjectKind: "count",
      subjectId: posted.countId,
      fields: { lotId: opened.lotId, number: opened.number, countedGrams: posted.countedGrams },
      personal: { sheet: input.sheet },
      actId: posted.actId,
    });
    return {
      countId: posted.countId,
      number: opened.number,
      kind: "opening",
      bookGrams: 0,
      countedGrams: posted.countedGrams,
      differenceGrams: posted.countedGrams,
      closed: false,
      recordedAt: ctx.now,
      undoUntil: undoUntil(ctx.now),
    };
  });
}
