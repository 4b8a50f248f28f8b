/** Every ledger line of a period, page by page by key, up to an entry that was fixed before the first page. */
import "server-only";
import type { Period } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";

export type MovementRow = {
  entryId: number;
  seq: number;
  kind: string;
  bookedDay: string;
  concernsDay: string | null;
  occurredAt: number;
  recordedAt: number;
  subject: string;
  reverses: number | null;
  account: string;
  cause: string | null;
  holder: string | null;
  row: string | null;
  polymer: string | null;
  materialKind: string | null;
  colourCode: string | null;
  form: string | null;
  wash: string | null;
  grams: number;
  afterGrams: number | null;
  basis: string | null;
  scale: number | null;
};

/** Lines of a page: what is live at once fits a young generation of 8 MB, so that it costs no memory and little time. */
const PAGE = 50;

/**
 * Walks lines by their key, which is the order of recording. A period is found in it by skipping entries of
 * other days: booked days mostly ascend with the entry's number, so little is skipped between the bounds.
 */
export const MOVEMENTS_SQL = `
  select n.entry_id as entryId, n.seq, e.kind, e.booked_day as bookedDay, e.concerns_day as concernsDay,
         e.occurred_at as occurredAt, e.recorded_at as recordedAt, e.subject, e.reverses, n.account, n.cause,
         h.code as holder, case r.id when 1 then 'unsorted' when 2 then 'reject' end as "row", r.polymer,
         r.kind as materialKind, r.colour_code as colourCode, m.form, m.wash, n.grams, n.after as afterGrams,
         n.basis, n.scale_id as scale
    from lines n
    join entries e on e.id = n.entry_id
    join materials m on m.id = n.material_id
    join rows r on r.id = m.row_id
    left join holders h on h.id = n.holder_id
   where (n.entry_id, n.seq) > (@entryId, @seq) and n.entry_id <= @last
     and e.booked_day >= @from and e.booked_day < @until
   order by n.entry_id, n.seq limit ${PAGE}`;

export type MovementBounds = { first: number; last: number };

/**
 * First and last entry booked in a period, of those that exist now; null when there are none. Entries that
 * are posted while the export runs come after `last` and stay out.
 */
export function movementBounds(db: Readable, period: Period): MovementBounds | null {
  const bounds = prepared(
    db.client,
    "select min(id) as first, max(id) as last from entries where booked_day >= ? and booked_day < ?",
  ).get(period.from, period.until) as { first: number | null; last: number | null };
  return bounds.first === null || bounds.last === null
    ? null
    : { first: bounds.first, last: bounds.last };
}

/** Pages of lines; the caller may write, or wait, between two pages. */
export function* pagesOfMovements(
  db: Readable,
  period: Period,
  bounds: MovementBounds,
): Generator<MovementRow[]> {
  let entryId = bounds.first - 1;
  let seq = Number.MAX_SAFE_INTEGER;
  for (;;) {
    const page = prepared(db.client, MOVEMENTS_SQL).all({
      entryId,
      seq,
      last: bounds.last,
      from: period.from,
      until: period.until,
    }) as MovementRow[];
    const last = page.at(-1);
    if (!last) return;
    yield page;
    if (page.length < PAGE) return;
    entryId = last.entryId;
    seq = last.seq;
  }
}
