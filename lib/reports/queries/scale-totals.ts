/** Kilograms by basis and scale: whole months from totals_scale, ragged ends from the lines of those days. */
import "server-only";
import { monthsAndDays, type Month, type Period } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";
import type { ScaleTotal } from "../rules/uncertainty";

export type MonthScaleTotal = ScaleTotal & { month: Month };

const MONTHS_SQL = `
  select month, measure, basis, scale_id as scaleNumber, grams, mpe_mg as mpeMilligrams
    from totals_scale where month >= ? and month < ?`;

/**
 * The same sums for days that make no whole month. A reversal counts as the negative of what it reverses;
 * the measure of a line follows the ledger's own rule for its totals.
 */
export const DAYS_SQL = `
  select month, measure, basis, scaleNumber, sum(sign * size) as grams, sum(sign * mpe) as mpeMilligrams
    from (
      select substr(e.booked_day, 1, 7) as month, n.basis, coalesce(n.scale_id, 0) as scaleNumber,
             case when e.kind = 'reversal' then -1 else 1 end as sign, abs(n.grams) as size,
             coalesce(n.mpe_mg, 0) as mpe,
             case n.account
               when 'source' then
                 case (select o.type from line_parts p join origins o on o.no = p.key
                        where p.entry_id = n.entry_id and p.seq = n.seq and p.dim = 'O' limit 1)
                   when 'donated' then 'collected' else 'other-in' end
               when 'lot' then
                 case when exists (select 1 from lines b where b.entry_id = n.entry_id and b.account = 'bag')
                   then 'accepted' end
               when 'reject-bin' then 'rejected'
               when 'opening' then 'opening'
               when 'disposed' then 'disposed'
               when 'passed-on' then 'passed-on'
               when 'pieces' then 'pieces'
             end as measure
        from entries e join lines n on n.entry_id = e.id
       where e.booked_day >= ? and e.booked_day < ? and n.basis is not null)
   where measure is not null
   group by month, measure, basis, scaleNumber`;

/** What each scale weighed in a period, by month, heading and basis. */
export function listScaleTotals(db: Readable, period: Period): MonthScaleTotal[] {
  const { months, days } = monthsAndDays(period);
  const found: MonthScaleTotal[] = [];
  if (months) {
    found.push(
      ...(prepared(db.client, MONTHS_SQL).all(months.from, months.until) as MonthScaleTotal[]),
    );
  }
  for (const part of days) {
    found.push(...(prepared(db.client, DAYS_SQL).all(part.from, part.until) as MonthScaleTotal[]));
  }
  return found;
}
