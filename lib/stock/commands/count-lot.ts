/** Counting on the spot, by whoever stands at the bin. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { AppError, type ErrorDetail } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import { formatClock, type Instant } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { getEntry } from "@/lib/ledger/queries/entries";
import { allow, may, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type { CountLotInput, CountReceipt } from "../contract/counts";
import { bookGrams, lastSeen, personName, requireLot, type LotRecord } from "../queries/lot-record";
import { doneAt, judgeSeen } from "../rules/counting";
import { ENTRY_WORDS } from "../rules/entry-words";
import { postCountIn, readFound } from "./post-count";

/**
 * A lot becomes what was counted; the difference stands under its own name. "Bin is empty" closes the lot.
 *
 * @throws AppError `not-found`, `count-zero` and what {@link readFound} throws; `lot-counted-meanwhile` or
 *   `lot-moved-meanwhile` until it is confirmed
 */
export function countLot(ctx: Context, input: CountLotInput): CountReceipt {
  allow(ctx, "stock.count");
  const person = requirePerson(ctx);
  return once<CountReceipt>(ctx, `POST /api/lots/${input.number}/counts`, input.requestId, (tx) => {
    const lot = requireLot(tx, input.number);
    const occurredAt = doneAt(input.occurredAt, lot.openedAt, ctx.now);
    const found = readFound(tx, input.counted, occurredAt, ["counted"]);
    if (!input.confirmed) requireSeen(tx, lot, input);
    const kind = input.counted.found === "empty" ? "empty" : "count";
    const posted = postCountIn(tx, ctx, {
      countId: input.requestId as Id<"count">,
      kind,
      lot,
      found,
      occurredAt,
      reviewedBy: may(ctx, "stock.review") ? person : null,
    });
    recordAudit(tx, ctx, {
      action: "stock.count",
      subjectKind: "count",
      subjectId: posted.countId,
      fields: {
        lotId: lot.lotId,
        kind,
        bookGrams: posted.bookGrams,
        countedGrams: posted.countedGrams,
        confirmed: input.confirmed,
      },
      actId: posted.actId,
    });
    return {
      countId: posted.countId,
      number: lot.number,
      kind,
      bookGrams: posted.bookGrams,
      countedGrams: posted.countedGrams,
      differenceGrams: posted.countedGrams - posted.bookGrams,
      closed: posted.closed,
      recordedAt: ctx.now,
      undoUntil: undoUntil(ctx.now),
    };
  });
}

/** Two counts at once: the second is told what the first found, and when. */
function requireSeen(tx: Tx, lot: LotRecord, input: CountLotInput): void {
  const now = lastSeen(tx, lot);
  const verdict = judgeSeen(input.seen, now);
  if (verdict === "same") return;
  const zone = requireScheme(tx).timeZone;
  const clock = (at: Instant) => formatClock(at, zone);
  if (verdict === "counted" && now.countId !== null) {
    const other = prepared(
      tx.client,
      "select counted_grams as grams, recorded_at as at, done_by as doneBy from counts where id = ?",
    ).get(now.countId) as { grams: number; at: Instant; doneBy: string };
    throw new AppError(
      "lot-counted-meanwhile",
      {
        number: lot.number,
        foundKg: formatKg(other.grams),
        who: personName(tx, other.doneBy),
        when: clock(other.at),
      },
      ["confirmed"],
    );
  }
  const entry = getEntry(tx, now.entryId);
  const detail: ErrorDetail = {
    number: lot.number,
    what: entry ? ENTRY_WORDS[entry.kind].toLowerCase() : "changed",
    who: personName(tx, entry?.doneBy ?? ""),
    when: entry ? clock(entry.recordedAt) : "",
    bookKg: formatKg(bookGrams(tx, lot)),
  };
  throw new AppError("lot-moved-meanwhile", detail, ["confirmed"]);
}
