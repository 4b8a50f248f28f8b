/** What the scheme itself loses in a step: shown on the page of steps, and read by planning. */
import "server-only";
import type { PolymerAnswer } from "@/lib/core/plastics";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { OwnLoss } from "../contract/steps";
import { LAST_STEPS, lossOf, type StepShare } from "../rules/own-loss";
import { STEP_KINDS, type StepKind } from "../terms";

/** A polymer that is hardly ever shredded is looked for among so many last steps. */
const LOOKED_AT = 500;

export const OWN_LOSS_SQL = `
  select inputGrams, outputGrams from (
    select id, input_grams as inputGrams, output_grams as outputGrams from steps
     where kind = @kind and state = 'posted' order by recorded_at desc limit ${LOOKED_AT}) s
   where @polymer is null or exists (
     select 1 from step_inputs i join lots l on l.id = i.lot_id join materials m on m.id = l.material_id
       join rows r on r.id = m.row_id where i.step_id = s.id and r.polymer = @polymer)
   limit ${LAST_STEPS}`;

/** Mean, spread and count of a step's last ones, of one polymer or of all. */
export function ownLoss(
  db: Readable,
  kind: StepKind,
  polymer: PolymerAnswer | null = null,
): OwnLoss {
  const steps = prepared(db.client, OWN_LOSS_SQL).all({ kind, polymer }) as StepShare[];
  return { kind, ...lossOf(steps) };
}

/** Of every step, in the order of the work. */
export function listOwnLosses(ctx: Context): OwnLoss[] {
  allow(ctx, "stock.read");
  return inSnapshot(ctx, (db) => STEP_KINDS.map((kind) => ownLoss(db, kind)));
}
