/** Lots that a run could draw from: of its polymer, its colours and the kinds of its piece, oldest first. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Form, Kind, WashState } from "@/lib/core/plastics";
import { prepared, type Readable } from "@/lib/platform/database";
import { isUsable } from "../rules/usable";
import type { Method } from "../terms";

export const LOTS_FOR_RUN_SQL = `
  select l.id as lotId, l.number, l.place, r.colour_code as colourCode, r.kind, m.form, m.wash,
         b.grams as heldGrams, p.method
    from runs u
    join pieces p on p.id = u.piece_id
    join run_colours c on c.run_id = u.id
    join rows r on r.polymer = u.polymer and r.colour_code = c.colour_code
    join piece_kinds k on k.piece_id = p.id and k.kind = r.kind
    join materials m on m.row_id = r.id
    join lots l on l.material_id = m.id
    join balances b on b.holder_id = l.holder_id and b.material_id = m.id
   where u.id = ? and b.grams > 0
   order by l.opened_at, l.number`;

export type LotForRun = {
  lotId: string;
  number: number;
  place: string;
  colourCode: string;
  kind: Kind;
  form: Form;
  wash: WashState;
  heldGrams: number;
  /** The method takes it as it is; otherwise it needs a step first. */
  usable: boolean;
};

export function lotsForRun(db: Readable, runId: Id<"run">): LotForRun[] {
  const rows = prepared(db.client, LOTS_FOR_RUN_SQL).all(runId) as (Omit<LotForRun, "usable"> & {
    method: Method;
  })[];
  return rows.map(({ method, ...lot }) => ({ ...lot, usable: isUsable(method, lot) }));
}
