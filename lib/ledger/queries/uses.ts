/** What was taken later from what an act filled: named before and after a correction. */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import type { LaterUses } from "@/lib/core/schemas";

/** Later uses that a screen names one by one; a longer list says how many more there are. */
const MOST_NAMED = 20;

/** Entries that took from what an act filled and still stand, oldest first. */
export function listLaterUses(db: Readable, actId: number): LaterUses {
  const all = prepared(
    db.client,
    `select e.id as entryId, e.kind, e.subject, e.occurred_at as occurredAt, -sum(later.grams) as grams
       from (select distinct holder_id, material_id from lines
              where entry_id in (select id from entries where act_id = @actId)
                and holder_id is not null and grams > 0) filled
       join lines later on later.holder_id = filled.holder_id and later.material_id = filled.material_id
       join entries e on e.id = later.entry_id
      where later.entry_id > (select max(id) from entries where act_id = @actId)
        and later.grams < 0 and e.kind not in ('reversal', 'settling')
        and not exists (select 1 from entries back where back.reverses = e.id)
      group by e.id order by e.id`,
  ).all({ actId }) as LaterUses["uses"];
  return { uses: all.slice(0, MOST_NAMED), count: all.length };
}
