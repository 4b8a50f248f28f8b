/** What is printed on the labels of lots. */
import "server-only";
import type { LabelCode } from "@/lib/core/bag-code";
import type { PolymerAnswer, Kind, Form, WashState } from "@/lib/core/plastics";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";

export type LotLabel = {
  number: number;
  code: LabelCode;
  colourName: string;
  polymer: PolymerAnswer;
  kind: Kind;
  form: Form;
  wash: WashState;
  openedAt: Instant;
};

/** Labels of one print. */
export const MOST_LABELS = 210;

const LABEL_SQL = `
  select l.number, h.code, coalesce(c.name, r.colour_code) as colourName, r.polymer, r.kind, m.form, m.wash,
         l.opened_at as openedAt
    from lots l
    join holders h on h.id = l.holder_id
    join materials m on m.id = l.material_id
    join rows r on r.id = m.row_id
    left join colours c on c.code = r.colour_code
   where l.number = ?`;

/** Labels of these lots, in this order; a number that no lot has is left out. */
export function listLotLabels(ctx: Context, numbers: readonly number[]): LotLabel[] {
  allow(ctx, "stock.read");
  return numbers.slice(0, MOST_LABELS).flatMap((number) => {
    const row = prepared(ctx.db.reader.client, LABEL_SQL).get(number) as LotLabel | undefined;
    return row ?? [];
  });
}
