/** Stock as it stands, read from the balances: what the ledger grew to before costs nothing here. */
import "server-only";
import type * as z from "zod";
import { dayOf } from "@/lib/core/time";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import type { Stock, StockCell, StockColour, StockFilter, stockEndpoint } from "../contract/stock";

/**
 * One row for each polymer and colour that holds something. Runs hold the same materials, so the sum goes
 * over lots only. A promise that its lot no longer covers is reserved no further than the lot holds.
 */
export const CELLS_SQL = `
  select r.polymer, r.colour_code as colourCode, sum(b.grams) as grams, count(*) as lots,
         sum(min(b.grams, coalesce((select sum(v.grams) from reservations v
                                     where v.lot_id = l.id and v.state = 'held'), 0))) as reservedGrams
    from balances b
    join lots l on l.holder_id = b.holder_id
    join materials m on m.id = b.material_id
    join rows r on r.id = m.row_id
   where b.grams > 0 and b.material_id > ${REJECT}
     and (@kind is null or r.kind = @kind) and (@form is null or m.form = @form)
     and (@wash is null or m.wash = @wash)
   group by r.polymer, r.colour_code`;

/** Bags and grams of one of the two materials that are no stock: unsorted, reject. */
export const LOOSE_SQL = `
  select count(*) as holders, coalesce(sum(b.grams), 0) as grams
    from balances b where b.grams > 0 and b.material_id = ?`;

export const TODAY_SQL = `
  select coalesce(sum(bags), 0) as bags, coalesce(sum(collected), 0) as grams from totals_day where day = ?`;

type Loose = { holders: number; grams: number };

function listCells(db: Readable, filter: StockFilter): StockCell[] {
  return prepared(db.client, CELLS_SQL).all({
    kind: filter.kind ?? null,
    form: filter.form ?? null,
    wash: filter.wash ?? null,
  }) as StockCell[];
}

/**
 * What is on the shelf by polymer and colour, with unsorted bags, the reject bin and today's weigh-ins.
 */
export function getStock(ctx: Context, filter: z.output<typeof stockEndpoint.input>): Stock {
  allow(ctx, "stock.read");
  return inSnapshot<Stock>(ctx, (db) => {
    const cells = listCells(db, filter);
    const held = new Set(cells.map((cell) => cell.colourCode));
    const colours = prepared(
      db.client,
      `select code, name, hex, look, retired_at is not null as retired from colours order by position, code`,
    ).all() as (StockColour & { retired: number })[];
    const loose = prepared(db.client, LOOSE_SQL);
    const unsorted = loose.get(UNSORTED) as Loose;
    const reject = loose.get(REJECT) as Loose;
    const today = dayOf(ctx.now, requireScheme(db).timeZone);
    return {
      cells,
      colours: colours
        .filter((colour) => !colour.retired || held.has(colour.code))
        .map(({ code, name, hex, look }) => ({ code, name, hex, look })),
      unsorted: { bags: unsorted.holders, grams: unsorted.grams },
      rejectGrams: reject.grams,
      today: prepared(db.client, TODAY_SQL).get(today) as Stock["today"],
    };
  });
}
