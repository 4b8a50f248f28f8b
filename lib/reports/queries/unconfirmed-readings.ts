/** Readings that were booked as weighed on a scale that was not confirmed, for a lead to look at. */
import "server-only";
import type { ScaleId } from "@/lib/core/ids";
import { addDays, dayOf, type Day, type Instant } from "@/lib/core/time";
import type { EntryKind } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { getScale } from "@/lib/scales/queries/scales";

export type UnconfirmedRecord = {
  kind: EntryKind;
  /** "weigh-in:<id>" */
  subject: string;
  occurredAt: Instant;
  grams: number;
  /** The bag's code; of a session of several the first. */
  code: string | null;
};
export type UnconfirmedDay = { day: Day; grams: number; records: UnconfirmedRecord[] };
export type Unconfirmed = {
  days: UnconfirmedDay[];
  /** There were more than are listed. */
  more: boolean;
};

/** So many days back a lead can still ask those who weighed. */
const DAYS_BACK = 31;
const MOST_RECORDS = 300;

/**
 * Lines read on this scale without a check, of entries that stand, by the day on which they happened. Walks the index
 * of booked days; a late entry of a closed month is booked on a later day and names its true one.
 */
const RECORDS_SQL = `
  select coalesce(e.concerns_day, e.booked_day) as day, e.kind, e.subject, e.occurred_at as occurredAt,
         sum(abs(l.grams)) as grams,
         case e.kind
           when 'weigh-in' then (select b.code from weigh_ins w join bags b on b.id = w.bag_id
                                  where w.id = substr(e.subject, 10))
           when 'sort' then (select b.code from sorting_bags s join bags b on b.id = s.bag_id
                              where s.session_id = substr(e.subject, 9) order by b.code limit 1)
         end as code
    from entries e
    join lines l on l.entry_id = e.id
   where e.booked_day >= @since and e.kind <> 'reversal' and l.scale_id = @number and l.basis = 'unchecked'
     and not exists (select 1 from entries back where back.reverses = e.id)
     and not exists (select 1 from scale_clearances c
                      where c.scale_id = @scaleId and c.day = coalesce(e.concerns_day, e.booked_day))
   group by e.subject, e.kind, day
   order by day desc, e.id desc limit ${MOST_RECORDS + 1}`;

function byDay(found: readonly (UnconfirmedRecord & { day: Day })[]): UnconfirmedDay[] {
  const days: UnconfirmedDay[] = [];
  for (const { day, ...record } of found) {
    let last = days.at(-1);
    if (last?.day !== day) {
      last = { day, grams: 0, records: [] };
      days.push(last);
    }
    last.grams += record.grams;
    last.records.push(record);
  }
  return days;
}

/** Of the last month, newest first; days that a lead has cleared are not listed. */
export function listUnconfirmed(ctx: Context, scaleId: ScaleId): Unconfirmed {
  allow(ctx, "scales.clear");
  return inSnapshot<Unconfirmed>(ctx, (db: Readable) => {
    const scale = getScale(db, scaleId);
    if (!scale) return { days: [], more: false };
    const since = addDays(dayOf(ctx.now, requireScheme(db).timeZone), -DAYS_BACK);
    const found = prepared(db.client, RECORDS_SQL).all({
      since,
      number: scale.number,
      scaleId,
    }) as (UnconfirmedRecord & { day: Day })[];
    return { days: byDay(found.slice(0, MOST_RECORDS)), more: found.length > MOST_RECORDS };
  });
}
