/** Reads of steps: one as stored, the list, one with all its readings. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { Id, PersonId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { mayStillUndo, undoUntil } from "@/lib/core/undo";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { listStepsEndpoint, StepSummary, StepView } from "../contract/steps";
import type { RecordState, StepKind } from "../terms";

export type StoredStep = {
  id: Id<"step">;
  kind: StepKind;
  inputGrams: number;
  outputGrams: number;
  actId: number;
  corrects: Id<"step"> | null;
  doneBy: PersonId;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
};

/** @throws AppError `not-found` */
export function requireStep(db: Readable, id: Id<"step">): StoredStep {
  const row = prepared(
    db.client,
    `select id, kind, input_grams as inputGrams, output_grams as outputGrams, act_id as actId, corrects,
            done_by as doneBy, occurred_at as occurredAt, recorded_at as recordedAt, state
       from steps where id = ?`,
  ).get(id) as StoredStep | undefined;
  if (!row) throw new AppError("not-found");
  return row;
}

const SUMMARY = `
  select s.id as stepId, s.kind, s.input_grams as inputGrams, s.output_grams as outputGrams,
         s.loss_grams as lossGrams, s.minutes, s.state, p.name as byName, s.done_by as doneBy,
         s.occurred_at as occurredAt, s.recorded_at as recordedAt, s.tolerance_mg as toleranceMilligrams, s.corrects,
         (select r.polymer from step_inputs i join lots l on l.id = i.lot_id
            join materials m on m.id = l.material_id join rows r on r.id = m.row_id
           where i.step_id = s.id limit 1) as polymer,
         (select group_concat(l.number) from step_inputs i join lots l on l.id = i.lot_id
           where i.step_id = s.id) as fromText,
         (select group_concat(distinct l.number) from step_outputs o join lots l on l.id = o.lot_id
           where o.step_id = s.id) as toText
    from steps s join people p on p.id = s.done_by`;

const PAGE = 50;

/** Ids begin with the time of the request, so their order is the order of saving. */
export const STEPS_SQL = `${SUMMARY}
   where s.id < @before and (@kind is null or s.kind = @kind) order by s.id desc limit ${PAGE + 1}`;

type SummaryRow = Omit<StepSummary, "fromNumbers" | "toNumbers"> & {
  fromText: string | null;
  toText: string | null;
  doneBy: string;
  recordedAt: number;
  toleranceMilligrams: number;
  corrects: string | null;
};

const numbersOf = (text: string | null): number[] =>
  (text ?? "")
    .split(",")
    .filter(Boolean)
    .map(Number)
    .sort((a, b) => a - b);

function summaryOf(row: SummaryRow): StepSummary {
  const { fromText, toText, doneBy: _by, recordedAt: _at, corrects: _corrects, ...rest } = row;
  const { toleranceMilligrams: _tolerance, ...summary } = rest;
  return {
    ...summary,
    byName: row.byName || "somebody who has left",
    fromNumbers: numbersOf(fromText),
    toNumbers: numbersOf(toText),
  };
}

/** Steps, newest first. */
export function listSteps(
  ctx: Context,
  input: z.output<typeof listStepsEndpoint.input>,
): z.output<typeof listStepsEndpoint.output> {
  allow(ctx, "stock.read");
  const found = prepared(ctx.db.reader.client, STEPS_SQL).all({
    before: input.before ?? "g",
    kind: input.kind ?? null,
  }) as SummaryRow[];
  const steps = found.slice(0, PAGE).map(summaryOf);
  return { steps, next: found.length > PAGE ? (steps.at(-1)?.stepId ?? null) : null };
}

const MATERIAL = `r.polymer, r.kind, r.colour_code as colourCode, coalesce(c.name, r.colour_code) as colourName,
  coalesce(c.hex, '#8d9490') as colourHex, coalesce(c.look, 'solid') as colourLook, m.form, m.wash`;
const MATERIAL_FROM = `join lots l on l.id = x.lot_id
    join materials m on m.id = l.material_id
    join rows r on r.id = m.row_id
    left join colours c on c.code = r.colour_code
    left join scales s on s.id = x.scale_id`;

/** One step with its lots, readings and losses, or null. */
export function getStep(ctx: Context, id: Id<"step">): StepView | null {
  allow(ctx, "stock.read");
  return inSnapshot<StepView | null>(ctx, (db) => {
    const row = prepared(db.client, `${SUMMARY} where s.id = ?`).get(id) as SummaryRow | undefined;
    if (!row) return null;
    const correction = prepared(
      db.client,
      `select x.reason, p.name as byName, x.at, x.replacement_id as replacementId
         from corrections x join people p on p.id = x.done_by
        where x.subject_kind = 'step' and x.subject_id = ?`,
    ).get(id) as StepView["correction"] | undefined;
    const mine = ctx.actor.kind === "person" && ctx.actor.id === row.doneBy;
    const open =
      mine &&
      row.state === "posted" &&
      row.corrects === null &&
      mayStillUndo(row.recordedAt as Instant, ctx.now);
    return {
      ...summaryOf(row),
      toleranceMilligrams: row.toleranceMilligrams,
      recordedAt: row.recordedAt,
      corrects: row.corrects,
      undoUntil: open ? undoUntil(row.recordedAt) : null,
      correction: correction ?? null,
      inputs: prepared(
        db.client,
        `select l.number, ${MATERIAL}, x.grams, x.taking, x.scale_id as scaleId, s.name as scaleName,
                x.gross_mg as grossMilligrams, x.less_mg as lessMilligrams
           from step_inputs x ${MATERIAL_FROM} where x.step_id = ? order by l.number`,
      ).all(id) as StepView["inputs"],
      outputs: prepared(
        db.client,
        `select l.number, ${MATERIAL}, x.grams, x.scale_id as scaleId, s.name as scaleName,
                x.gross_mg as grossMilligrams, x.tare_mg as tareMilligrams
           from step_outputs x ${MATERIAL_FROM} where x.step_id = ? order by x.seq`,
      ).all(id) as StepView["outputs"],
      losses: prepared(
        db.client,
        "select cause, grams from step_losses where step_id = ? order by grams desc, cause",
      ).all(id) as StepView["losses"],
    };
  });
}
