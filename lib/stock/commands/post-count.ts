/** The part that every count shares: its entry, its row, and what it does to the lot. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, PersonId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { postAct, type Draft } from "@/lib/ledger/commands/post";
import type { Basis } from "@/lib/ledger/terms";
import { requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Readable, type Tx } from "@/lib/platform/database";
import type { FoundInput } from "../contract/weighed";
import { bookGrams, type LotRecord } from "../queries/lot-record";
import { readWeighed, type Weighed } from "../queries/weighed";
import type { CountKind } from "../terms";
import { closeLotIn } from "./close-lot";

/** What somebody found: so many grams, by which reading. Without one somebody looked, and the bin was empty. */
export type Found = { grams: number; weighed: Weighed | null };

export type CountToPost = {
  countId: Id<"count">;
  kind: CountKind;
  lot: LotRecord;
  found: Found;
  occurredAt: Instant;
  sheet?: string;
  corrects?: Id<"count">;
  /** A lead's own count, and one that agrees with the book, wait for nobody. */
  reviewedBy: PersonId | null;
};

export type PostedCount = {
  countId: Id<"count">;
  bookGrams: number;
  countedGrams: number;
  actId: number | null;
  closed: boolean;
};

/**
 * What was found, read against the lists.
 *
 * @throws AppError of {@link readWeighed}; `count-zero` where nothing is left after the tare
 */
export function readFound(
  db: Readable,
  found: FoundInput,
  occurredAt: Instant,
  path: readonly (string | number)[],
): Found {
  if (found.found === "empty") return { grams: 0, weighed: null };
  try {
    const weighed = readWeighed(db, found, occurredAt, path);
    return { grams: weighed.netGrams, weighed };
  } catch (error) {
    if (error instanceof AppError && error.code === "net-zero") {
      throw new AppError("count-zero", {}, error.path);
    }
    throw error;
  }
}

/** A look into an empty bin is no weighing. */
export function basisOfFound({ weighed }: Found): Basis {
  return weighed?.basis ?? "estimated";
}

/**
 * The draft of a count: the lot becomes what was counted. null when it agrees with the book to the gram.
 *
 * @param book what the lot holds without this count
 */
export function countDraft(
  count: Pick<CountToPost, "countId" | "kind" | "lot" | "found" | "occurredAt">,
  book: number,
): Draft | null {
  const { lot, found } = count;
  const opening = count.kind === "opening";
  // What stood there on the first day is no difference, whatever moved since.
  const grams = opening ? found.grams : found.grams - book;
  if (grams === 0) return null;
  return {
    kind: opening ? "opening" : "count",
    occurredAt: count.occurredAt,
    subject: `count:${count.countId}`,
    lines: [
      {
        account: "lot",
        holderId: lot.holderId,
        materialId: lot.materialId,
        grams,
        ...(opening ? {} : readingOf(found)),
      },
      opening
        ? {
            account: "opening",
            originNo: 0,
            materialId: lot.materialId,
            grams: -grams,
            ...readingOf(found),
          }
        : { account: "difference", grams: -grams },
    ],
  };
}

function readingOf(found: Found): {
  basis: Basis;
  scaleNumber: number | null;
  mpeMilligrams: number;
} {
  return {
    basis: basisOfFound(found),
    scaleNumber: found.weighed?.scaleNumber ?? null,
    mpeMilligrams: found.weighed?.mpeMilligrams ?? 0,
  };
}

/** Posts a count and keeps its record. "Empty" closes the lot. A step of a larger command, which writes the audit row. */
export function postCountIn(tx: Tx, ctx: Context, count: CountToPost): PostedCount {
  const book = bookGrams(tx, count.lot);
  const doneBy = requirePerson(ctx);
  const draft = countDraft(count, book);
  const actId = draft
    ? postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, [draft]).actId
    : null;
  const closed = count.kind === "empty" && closeLotIn(tx, count.lot.lotId, ctx.now, "empty");
  insertCountIn(tx, ctx, count, { book, actId });
  return {
    countId: count.countId,
    bookGrams: book,
    countedGrams: count.found.grams,
    actId,
    closed,
  };
}

/** The row of a count, with the act that it made. */
export function insertCountIn(
  tx: Tx,
  ctx: Context,
  count: CountToPost,
  of: { book: number; actId: number | null },
): void {
  const { found } = count;
  const agrees = of.actId === null;
  prepared(
    tx.client,
    `insert into counts (id, kind, lot_id, book_grams, counted_grams, basis, scale_id, gross_mg, tare_mg, mpe_mg, sheet,
       act_id, corrects, reviewed_by, reviewed_at, done_by, occurred_at, recorded_at, state)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, 'posted')`,
  ).run(
    count.countId,
    count.kind,
    count.lot.lotId,
    of.book,
    found.grams,
    basisOfFound(found),
    found.weighed?.scaleId ?? null,
    found.weighed?.grossMilligrams ?? null,
    found.weighed?.tareMilligrams ?? null,
    found.weighed?.mpeMilligrams ?? 0,
    count.sheet ?? null,
    of.actId,
    count.corrects ?? null,
    count.reviewedBy,
    count.reviewedBy !== null || agrees ? ctx.now : null,
    requirePerson(ctx),
    count.occurredAt,
    ctx.now,
  );
}
