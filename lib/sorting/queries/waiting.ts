/** Bags that wait to be sorted. */
import "server-only";
import type * as z from "zod";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared } from "@/lib/platform/database";
import type { WaitingBag, waitingBagsEndpoint } from "../contract/sortings";

const PAGE = 50;

/** Walks the index of states, oldest first; bags that are sorted cost nothing. */
export const WAITING_SQL = `
  select b.id, b.code, p.name as pointName, b.state_since as since, w.occurred_at as weighedAt,
         w.net_grams as netGrams, w.condition, w.polymer
    from bags b
    join weigh_ins w on w.bag_id = b.id and w.state = 'posted'
    left join points p on p.id = b.point_id
   where b.state = 'weighed' and b.state_since >= @since and (b.state_since > @since or b.id > @id)
   order by b.state_since, b.id limit ${PAGE + 1}`;

type Row = WaitingBag & { id: string; since: number };

function readCursor(after: string | undefined): { since: number; id: string } {
  const [since = "", id = ""] = (after ?? "").split("_", 2);
  return /^\d{1,15}$/.test(since) ? { since: Number(since), id } : { since: 0, id: "" };
}

/** Oldest first, a page at a time, with how much waits in all. */
export function listWaitingBags(
  ctx: Context,
  input: z.output<typeof waitingBagsEndpoint.input>,
): z.output<typeof waitingBagsEndpoint.output> {
  allow(ctx, "sorting.record");
  return inSnapshot<z.output<typeof waitingBagsEndpoint.output>>(ctx, (db) => {
    const found = prepared(db.client, WAITING_SQL).all(readCursor(input.after)) as Row[];
    const waiting = prepared(
      db.client,
      `select count(*) as bags, coalesce(sum(grams), 0) as grams from balances
        where grams > 0 and material_id = ?`,
    ).get(UNSORTED) as { bags: number; grams: number };
    const page = found.slice(0, PAGE);
    const last = page.at(-1);
    return {
      bags: page.map(({ id: _id, since: _since, ...bag }) => bag),
      next: found.length > PAGE && last ? `${last.since}_${last.id}` : null,
      waiting,
    };
  });
}
