/** Bags split into piles and rejects: one act in the ledger, whole or not at all. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { moveBagIn } from "@/lib/bags/commands/move-bag";
import { getBagByCode } from "@/lib/bags/queries";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { BagId, SortingId } from "@/lib/core/ids";
import { postAct } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { CloseSortingInput, SortingReceipt } from "../contract/sortings";
import { otherDraftOf } from "../queries/drafts";
import { getWeighedBag } from "../queries/table";
import { CLOSE_SORTING_ADDRESS } from "../terms";
import { insertSession, judgeTableIn, sortDraft, type TippedBag } from "./session";

/**
 * Splits the bags on a table: what the book holds for them leaves them, piles go to their lots (opened where
 * none is open), rejects to the bin, and what is over or missing is posted as difference, or as loss of the
 * named cause. Of several bags, origins are shared by net weight. A draft of the same id is thereby saved.
 *
 * @throws AppError `unknown-code`, `bag-not-weighed`, `bag-already-sorted`, `bag-in-other-session`, and what
 *   {@link judgeTableIn} refuses
 */
export function closeSorting(ctx: Context, input: CloseSortingInput): SortingReceipt {
  allow(ctx, "sorting.record");
  const doneBy = requirePerson(ctx);
  return once<SortingReceipt>(
    ctx,
    `${CLOSE_SORTING_ADDRESS.method} ${CLOSE_SORTING_ADDRESS.path}`,
    input.requestId,
    (tx) => {
      const sortingId = input.requestId as SortingId;
      const bags = tippedBags(tx, sortingId, input.codes);
      const table = judgeTableIn(tx, ctx, bags, input);
      const { actId } = postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, [
        sortDraft(tx, sortingId, table),
      ]);
      const receipt = insertSession(tx, ctx, { sortingId, doneBy, actId, corrects: null, table });
      for (const { bag } of bags) moveBagIn(tx, bag.id, "sorted", ctx.now);
      prepared(tx.client, "update sorting_drafts set state = 'saved' where id = ?").run(sortingId);
      prepared(tx.client, "update sorting_draft_bags set live = 0 where draft_id = ?").run(
        sortingId,
      );
      recordAudit(tx, ctx, {
        action: "sorting.close",
        subjectKind: "sorting",
        subjectId: sortingId,
        fields: {
          bags: bags.map(({ bag }) => bag.id).join(" "),
          netGrams: receipt.netGrams,
          acceptedGrams: receipt.acceptedGrams,
          rejectedGrams: receipt.rejectedGrams,
          differenceGrams: receipt.differenceGrams,
          cause: receipt.cause,
          judged: table.verdict.kind,
          lotsOpened: receipt.lots
            .filter((lot) => lot.opened)
            .map((lot) => lot.number)
            .join(" "),
        },
        actId,
      });
      return receipt;
    },
  );
}

/** Two tags of one bag are one bag. */
function tippedBags(tx: Tx, sortingId: SortingId, codes: readonly LabelCode[]): TippedBag[] {
  const found = new Map<BagId, TippedBag>();
  for (const [at, code] of codes.entries()) {
    const tipped = requireTipped(tx, sortingId, code, ["codes", at]);
    found.set(tipped.bag.id, tipped);
  }
  return [...found.values()];
}

function requireTipped(
  tx: Tx,
  sortingId: SortingId,
  wanted: LabelCode,
  path: readonly (string | number)[],
): TippedBag {
  const bag = getBagByCode(tx, wanted);
  const code = formatCode(wanted);
  if (!bag) throw new AppError("unknown-code", { code }, path);
  if (bag.state === "sorted" || bag.state === "closed") {
    throw new AppError("bag-already-sorted", { code }, path);
  }
  const weighed = bag.state === "weighed" ? getWeighedBag(tx, bag.id, bag.code) : null;
  if (!weighed) throw new AppError("bag-not-weighed", { code }, path);
  const other = otherDraftOf(tx, bag.id, sortingId);
  if (other) throw new AppError("bag-in-other-session", { code, who: other.who }, path);
  return { bag, weighed, grams: heldBy(tx, weighed.holderId, UNSORTED) };
}
