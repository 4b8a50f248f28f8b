/** Bags that wait to be sorted. */
import "server-only";
import type * as z from "zod";
import type { LabelCode } from "@/lib/core/bag-code";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared } from "@/lib/platform/database";
import type { WaitingBag, WaitingFilter, waitingBagsEndpoint } from "../contract/waiting";
import { suggestAlone } from "../rules/drafts";

const PAGE = 50;

const CONDITIONS: Readonly<Record<keyof WaitingFilter, string>> = {
  pointId: "b.point_id = @pointId",
  polymer: "w.polymer = @polymer",
  condition: "w.condition = @condition",
  point: "p.name like @point escape '\\'",
};

/**
 * Walks the index of states, oldest first; bags that are sorted cost nothing. Only what is filtered by stands
 * in the statement, because "or it is null" would hide the index from the planner.
 */
export function waitingSql(filters: readonly (keyof WaitingFilter)[]): string {
  return `
  select b.id, b.code, p.name as pointName, b.state_since as since, w.occurred_at as weighedAt,
         w.net_grams as netGrams, w.condition, w.polymer, c.name as colourName, c.hex as colourHex,
         c.look as colourLook, d.id as draftId, who.name as draftWho,
         (select ph.id from photos ph where ph.subject_kind = 'weigh-in' and ph.subject_id = w.id
            and ph.removed_at is null order by ph.added_at limit 1) as photoId
    from bags b
    join weigh_ins w on w.bag_id = b.id and w.state = 'posted'
    left join points p on p.id = b.point_id
    left join colours c on c.code = w.colour_code
    left join sorting_draft_bags t on t.bag_id = b.id and t.live = 1
    left join sorting_drafts d on d.id = t.draft_id and d.state = 'open'
    left join people who on who.id = d.changed_by
   where b.state = 'weighed' and b.state_since >= @since and (b.state_since > @since or b.id > @id)
     ${filters.map((name) => `and ${CONDITIONS[name]}`).join(" ")}
   order by b.state_since, b.id limit ${PAGE + 1}`;
}

type Row = Omit<WaitingBag, "colour" | "alone" | "draft"> & {
  id: string;
  since: number;
  code: LabelCode;
  colourName: string | null;
  colourHex: string;
  colourLook: NonNullable<WaitingBag["colour"]>["look"];
  draftId: string | null;
  draftWho: string;
};

function readCursor(after: string | undefined): { since: number; id: string } {
  const [since = "", id = ""] = (after ?? "").split("_", 2);
  return /^\d{1,15}$/.test(since) ? { since: Number(since), id } : { since: 0, id: "" };
}

function asBag(row: Row): WaitingBag {
  const {
    id: _id,
    since: _since,
    colourName,
    colourHex,
    colourLook,
    draftId,
    draftWho,
    ...bag
  } = row;
  return {
    ...bag,
    colour: colourName === null ? null : { name: colourName, hex: colourHex, look: colourLook },
    alone: suggestAlone(row.code),
    draft: draftId === null ? null : { id: draftId, who: draftWho },
  };
}

/** Oldest first, a page at a time, with how much waits in all. */
export function listWaitingBags(
  ctx: Context,
  input: z.output<typeof waitingBagsEndpoint.input>,
): z.output<typeof waitingBagsEndpoint.output> {
  allow(ctx, "sorting.record");
  const { after, point, ...exact } = input;
  // What LIKE would read as a sign of its own is taken as it stands.
  const words = point && `%${point.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
  const filters: WaitingFilter = { ...exact, point: words };
  const used = (Object.keys(CONDITIONS) as (keyof WaitingFilter)[]).filter((name) => filters[name]);
  return inSnapshot<z.output<typeof waitingBagsEndpoint.output>>(ctx, (db) => {
    const values = Object.fromEntries(used.map((name) => [name, filters[name]]));
    const found = prepared(db.client, waitingSql(used)).all({
      ...readCursor(after),
      ...values,
    }) as Row[];
    const waiting = prepared(
      db.client,
      `select count(*) as bags, coalesce(sum(grams), 0) as grams from balances
        where grams > 0 and material_id = ?`,
    ).get(UNSORTED) as { bags: number; grams: number };
    const page = found.slice(0, PAGE);
    const last = page.at(-1);
    return {
      bags: page.map(asBag),
      next: found.length > PAGE && last ? `${last.since}_${last.id}` : null,
      waiting,
    };
  });
}
