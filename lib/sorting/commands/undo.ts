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
import type { undoSortingEndpoint } from "../contract";
import { getWeighedBag } from "../queries/table";
import type { SortingState } from "../terms";

type Stored = {
  id: SortingId;
  state: SortingState;
  doneBy: string;
  recordedAt: Instant;
  actId: number;
  bagId: BagId;
  code: LabelCode;
};

/**
 * Takes a sorting back: the exact negative of its act; the bag waits again, since when it was weighed. Lots
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
      prepared(tx.client, "update sorting_bags set live = 0 where session_id = ?").run(sorting.id);
      const weighed = getWeighedBag(tx, sorting.bagId, sorting.code);
      moveBagIn(tx, sorting.bagId, "weighed", weighed?.recordedAt ?? ctx.now);
      recordAudit(tx, ctx, {
        action: "sorting.undo",
        subjectKind: "sorting",
        subjectId: sorting.id,
        fields: { bagId: sorting.bagId, undoneActId: actId },
        actId,
      });
      return { sortingId: sorting.id, code: sorting.code, bagState: "weighed" };
    },
  );
}

function requireSorting(tx: Tx, id: SortingId): Stored {
  const found = prepared(
    tx.client,
    `select s.id, s.state, s.done_by as doneBy, s.recorded_at as recordedAt, s.act_id as actId,
            b.id as bagId, b.code
       from sorting_sessions s
       join sorting_bags sb on sb.session_id = s.id
       join bags b on b.id = sb.bag_id
      where s.id = ?`,
  ).get(id) as Stored | undefined;
  if (!found) throw new AppError("not-found");
  return found;
}
