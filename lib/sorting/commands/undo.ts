/** Taking a sorting back while nothing has been built on it. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { moveBagIn } from "@/lib/bags/commands/move-bag";
import type { LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { BagId, SortingId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { judgeUndo } from "@/lib/core/undo";
import { reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { undoSortingEndpoint } from "../contract/sortings";
import { getWeighedBag, listBagsOf } from "../queries/table";
import type { SortingState } from "../terms";

type Stored = {
  id: SortingId;
  state: SortingState;
  doneBy: string;
  recordedAt: Instant;
  actId: number;
  corrects: SortingId | null;
};

/**
 * Takes a sorting back: the exact negative of its act; its bags wait again, since when they were weighed. Lots
 * that it opened stay, empty, because their labels may be printed already.
 *
 * @throws AppError `not-found`, `undone-already`, `undo-not-yours`, `undo-too-late`, `undo-used-since`
 */
export function undoSorting(
  ctx: Context,
  input: z.output<typeof undoSortingEndpoint.input>,
): z.output<typeof undoSortingEndpoint.output> {
  allow(ctx, "sorting.record");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoSortingEndpoint.output>>(
    ctx,
    `POST /api/sortings/${input.id}/undo`,
    input.requestId,
    (tx) => {
      const sorting = requireSorting(tx, input.id);
      const verdict = judgeUndo(sorting, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      // Taking a correction back would not bring back what it corrected.
      if (sorting.corrects !== null) throw new AppError("undo-of-correction");
      if (takenSince(tx, sorting.actId)) throw new AppError("undo-used-since");

      const { actId } = reverseAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: sorting.actId, subject: `sorting:${sorting.id}` },
      );
      prepared(
        tx.client,
        "update sorting_sessions set state = 'undone', undone_act_id = ? where id = ?",
      ).run(actId, sorting.id);
      const bags = releaseBagsIn(tx, ctx, sorting.id);
      recordAudit(tx, ctx, {
        action: "sorting.undo",
        subjectKind: "sorting",
        subjectId: sorting.id,
        fields: { bags: bags.map(({ id }) => id).join(" "), undoneActId: actId },
        actId,
      });
      return { sortingId: sorting.id, codes: bags.map(({ code }) => code), bagState: "weighed" };
    },
  );
}

/** The bags of a session that no longer stands wait again, since when they were weighed. */
export function releaseBagsIn(
  tx: Tx,
  ctx: Context,
  sortingId: SortingId,
): { id: BagId; code: LabelCode }[] {
  const bags = listBagsOf(tx, sortingId);
  prepared(tx.client, "update sorting_bags set live = 0 where session_id = ?").run(sortingId);
  for (const { id, code } of bags) {
    moveBagIn(tx, id, "weighed", getWeighedBag(tx, id, code)?.recordedAt ?? ctx.now);
  }
  return bags;
}

export function requireSorting(tx: Tx, id: SortingId): Stored {
  const found = prepared(
    tx.client,
    `select id, state, done_by as doneBy, recorded_at as recordedAt, act_id as actId, corrects
       from sorting_sessions where id = ?`,
  ).get(id) as Stored | undefined;
  if (!found) throw new AppError("not-found");
  return found;
}
