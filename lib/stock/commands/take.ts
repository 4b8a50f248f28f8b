/**
 * Taking out of a lot, shared by everything that draws: steps, moves, removals, runs. Taking more than the book holds
 * never stops work (product.md, The ledger).
 */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { newId, type Id } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import type { DraftLine } from "@/lib/ledger/rules/split";
import { may, requirePerson, type Context } from "@/lib/platform/context";
import type { Tx } from "@/lib/platform/database";
import type { FoundInput } from "../contract/weighed";
import { bookGrams, type LotRecord } from "../queries/lot-record";
import { askForReserved } from "../queries/reserved";
import type { Weighed } from "../queries/weighed";
import { judgeTaking } from "../rules/taking";
import { postCountIn, readFound, type Found } from "./post-count";

export type LotTaking = {
  lot: LotRecord;
  /** What was taken out; null: everything that the book holds, not weighed. */
  grams: number | null;
  /** What the readings behind `grams` can tell; 0 where there is none. */
  toleranceMilligrams: number;
  /** The container is empty now: then the weighing is a count of it as well. */
  all: boolean;
  /** The weighing behind `grams`, where there is one. */
  weighed: Weighed | null;
  /** What is left in the container, once it was asked for. */
  left: FoundInput | null;
  /** Grams that are promised to a run may be taken: it was asked. */
  reservedToo: boolean;
  occurredAt: Instant;
  /** Of the taking in the input; the count on the spot is its field `count`. */
  path: readonly (string | number)[];
};

export type TakenFromLot = {
  lot: LotRecord;
  /** What was taken out. */
  grams: number;
  /** For the caller's draft: what leaves the lot, never more than the book holds. */
  lines: DraftLine[];
  /** What the caller's draft posts as difference beside it: lines + grams + difference = 0. Below zero a gain. */
  differenceGrams: number;
  /** The count on the spot that made it possible: an act of its own, which a lead reviews. */
  countId: Id<"count"> | null;
};

/**
 * The lines of one draw. Within what the scale can tell the surplus is difference in the same entry; beyond it one
 * count on the spot is asked for, and with it the draw goes through. When the whole content was weighed, that weighing
 * is the count, and nobody is asked.
 *
 * @throws AppError `lot-holds-less` with book and wanted kilograms, until `left` says what is in the container;
 *   `lot-empty` when everything is taken of a lot that holds nothing; `lot-reserved` until it is taken knowingly
 */
export function takeFromLotIn(tx: Tx, ctx: Context, of: LotTaking): TakenFromLot {
  const { lot, path } = of;
  const book = bookGrams(tx, lot);
  const grams = of.grams ?? book;
  if (grams === 0) throw new AppError("lot-empty", { number: lot.number }, path);
  const judge = (held: number) =>
    judgeTaking({
      bookGrams: held,
      wantedGrams: grams,
      toleranceMilligrams: of.toleranceMilligrams,
      all: of.all,
    });
  askForReserved(tx, lot, of.all ? 0 : book - grams, of.reservedToo, path);
  let verdict = judge(book);
  let countId: Id<"count"> | null = null;
  if (verdict.kind !== "fine") {
    if (verdict.kind === "holds-less" && of.left === null) {
      throw new AppError(
        "lot-holds-less",
        { number: lot.number, bookKg: formatKg(book), wantedKg: formatKg(grams) },
        [...path, "count"],
      );
    }
    countId = countOnTheSpotIn(tx, ctx, of, grams);
    verdict = judge(bookGrams(tx, lot));
  }
  if (verdict.kind !== "fine") throw new Error(`lot ${lot.number} holds less than was counted`);
  return {
    lot,
    grams,
    lines: [
      {
        account: "lot",
        holderId: lot.holderId,
        materialId: lot.materialId,
        grams: -verdict.takenGrams,
      },
    ],
    differenceGrams: verdict.differenceGrams,
    countId,
  };
}

/** What was there before it was taken: what was taken, and what is left. */
function countOnTheSpotIn(tx: Tx, ctx: Context, of: LotTaking, grams: number): Id<"count"> {
  const left: Found =
    of.all || of.left === null
      ? { grams: 0, weighed: null }
      : readFound(tx, of.left, of.occurredAt, [...of.path, "count"]);
  // The readings of what is left, or, of an empty container, those of what was taken out of it.
  const weighed = left.weighed ?? of.weighed;
  return postCountIn(tx, ctx, {
    countId: newId<"count">(ctx.now),
    kind: "on-the-spot",
    lot: of.lot,
    found: { grams: left.grams + grams, weighed },
    occurredAt: of.occurredAt,
    reviewedBy: may(ctx, "stock.review") ? requirePerson(ctx) : null,
  }).countId;
}
