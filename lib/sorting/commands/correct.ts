import "server-only";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { getBagById } from "@/lib/bags/queries";
import { AppError } from "@/lib/core/errors";
import type { LotId, SortingId } from "@/lib/core/ids";
import { correctAct, type Draft } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { CorrectSortingInput, CorrectSortingReceipt } from "../contract/sortings";
import { getWeighedBag, listBagsOf } from "../queries/table";
import { takenFromBags } from "../queries/taken";
import { insertSession, judgeTableIn, sortDraft, type TippedBag } from "./session";
import { releaseBagsIn, requireSorting } from "./undo";

/**
 * Takes a sorting back, whatever was done with its lots since, and posts what should have stood there. What they
 * no longer hold is settled as difference; the later uses are named. Without a replacement the bags wait again.
 *
 * @throws AppError `not-found`, `corrected-already`, `undone-already`, and for the replacement what
 *   {@link judgeTableIn} refuses
 */
export function correctSorting(ctx: Context, input: CorrectSortingInput): CorrectSortingReceipt {
  allow(ctx, "sorting.correct");
  const person = requirePerson(ctx);
  return once<CorrectSortingReceipt>(
    ctx,
    `POST /api/sortings/${input.id}/correct`,
    input.requestId,
    (tx) => {
      const wrong = requireSorting(tx, input.id);
      if (wrong.state === "corrected") throw new AppError("corrected-already");
      if (wrong.state === "undone") throw new AppError("undone-already");
      const later = listLaterUses(tx, wrong.actId);
      const sortingId = input.requestId as SortingId;
      const table =
        input.replacement &&
        judgeTableIn(
          tx,
          ctx,
          bagsAgain(tx, wrong),
          input.replacement,
          ["replacement"],
          lotsOf(tx, wrong.id),
        );
      const drafts: Draft[] = table ? [sortDraft(tx, sortingId, table)] : [];
      const { actId } = correctAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: wrong.actId, subject: `sorting:${wrong.id}`, note: input.reason },
        drafts,
      );
      prepared(
        tx.client,
        "update sorting_sessions set state = 'corrected', undone_act_id = ? where id = ?",
      ).run(actId, wrong.id);
      const bags = listBagsOf(tx, wrong.id);
      if (table) {
        prepared(tx.client, "update sorting_bags set live = 0 where session_id = ?").run(wrong.id);
      } else releaseBagsIn(tx, ctx, wrong.id);
      const receipt =
        table &&
        insertSession(tx, ctx, { sortingId, doneBy: person, actId, corrects: wrong.id, table });
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "sorting",
        subjectId: wrong.id,
        replacementId: table ? sortingId : null,
        reason: input.reason,
        doneBy: person,
        actId,
      });
      recordAudit(tx, ctx, {
        action: "sorting.correct",
        subjectKind: "sorting",
        subjectId: wrong.id,
        fields: {
          replacement: table ? sortingId : null,
          acceptedGrams: receipt?.acceptedGrams ?? null,
          rejectedGrams: receipt?.rejectedGrams ?? null,
          differenceGrams: receipt?.differenceGrams ?? null,
          laterUses: later.count,
        },
        actId,
      });
      return { id: wrong.id, receipt, codes: bags.map(({ code }) => code), later };
    },
  );
}

/** The bags with what they hold once the session is taken back: what it took, and what corrections left since. */
function bagsAgain(tx: Tx, wrong: { id: SortingId; actId: number }): TippedBag[] {
  const taken = takenFromBags(tx, wrong.actId);
  return listBagsOf(tx, wrong.id).map(({ id, code }) => {
    const bag = getBagById(tx, id);
    const weighed = getWeighedBag(tx, id, code);
    // Its weigh-in may have been taken back whole: then nothing tells what the piles are made of.
    if (!bag || !weighed) throw new AppError("bag-not-weighed", { code });
    const grams = (taken.get(weighed.holderId) ?? 0) + heldBy(tx, weighed.holderId, UNSORTED);
    return { bag, weighed, grams };
  });
}

/** The lots that a session filled. */
function lotsOf(tx: Tx, sortingId: SortingId): ReadonlySet<LotId> {
  return new Set(
    prepared(tx.client, "select lot_id from fractions where session_id = ? and lot_id is not null")
      .pluck()
      .all(sortingId) as LotId[],
  );
}
