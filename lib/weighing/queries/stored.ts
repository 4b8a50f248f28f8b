/** A weigh-in as it was saved, with its readings; and the second readings that wait for somebody to decide. */
import "server-only";
import type * as z from "zod";
import type { LabelCode } from "@/lib/core/bag-code";
import type { BagId, LotId, PersonId, PointId, ScaleId, WeighInId } from "@/lib/core/ids";
import type { Kind, PolymerAnswer } from "@/lib/core/plastics";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import type { Basis } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { listForReviewEndpoint, weighInPageSchema } from "../contract/corrections";
import type { Condition, WeighInState } from "../terms";
import { helperName } from "./weigh-ins";

export type StoredWeighIn = {
  id: WeighInId;
  bagId: BagId;
  code: LabelCode;
  pointId: PointId;
  scaleId: ScaleId;
  doneBy: PersonId;
  occurredAt: Instant;
  recordedAt: Instant;
  state: WeighInState;
  netGrams: number;
  mpeMilligrams: number;
  basis: Basis;
  belowMinimum: boolean;
  condition: Condition;
  polymer: PolymerAnswer;
  kind: Kind | null;
  colourCode: string | null;
  oneKind: boolean;
  /** Of a bag of one kind. */
  lotId: LotId | null;
  actId: number | null;
  undoneActId: number | null;
  corrects: WeighInId | null;
  readings: ReadingInput[];
};

type Row = Omit<StoredWeighIn, "readings" | "belowMinimum" | "oneKind"> & {
  belowMinimum: 0 | 1;
  oneKind: 0 | 1;
};

export function getStoredWeighIn(db: Readable, id: WeighInId): StoredWeighIn | null {
  const row = prepared(
    db.client,
    `select w.id, w.bag_id as bagId, b.code, w.point_id as pointId, w.scale_id as scaleId, w.done_by as doneBy,
       w.occurred_at as occurredAt, w.recorded_at as recordedAt, w.state, w.net_grams as netGrams,
       w.mpe_mg as mpeMilligrams, w.basis, w.below_minimum as belowMinimum, w.condition, w.polymer, w.kind,
       w.colour_code as colourCode, w.one_kind as oneKind, w.lot_id as lotId, w.act_id as actId, w.undone_act_id as undoneActId, w.corrects
      from weigh_ins w join bags b on b.id = w.bag_id where w.id = ?`,
  ).get(id) as Row | undefined;
  if (!row) return null;
  const readings = prepared(
    db.client,
    `select gross_mg as grossMilligrams, container_id as containerId, container_tare_mg as containerTareMilligrams,
       sack_id as sackId, sack_tare_mg as sackTareMilligrams
      from weigh_in_readings where weigh_in_id = ? order by seq`,
  ).all(id) as ReadingInput[];
  return { ...row, belowMinimum: row.belowMinimum === 1, oneKind: row.oneKind === 1, readings };
}

/** Everything that the page of one weigh-in shows. null when there is none. */
export function getWeighInPage(
  ctx: Context,
  id: string,
): z.output<typeof weighInPageSchema> | null {
  allow(ctx, "weighing.record");
  return inSnapshot(ctx, (db) => {
    const stored = getStoredWeighIn(db, id as WeighInId);
    if (!stored) return null;
    const names = prepared(
      db.client,
      `select p.name as pointName, s.name as scaleName, c.name as colourName, l.number as lotNumber
         from weigh_ins w join points p on p.id = w.point_id join scales s on s.id = w.scale_id
         left join colours c on c.code = w.colour_code left join lots l on l.id = w.lot_id where w.id = ?`,
    ).get(id) as {
      pointName: string;
      scaleName: string;
      colourName: string | null;
      lotNumber: number | null;
    };
    const correction = prepared(
      db.client,
      `select reason, replacement_id as replacementId, done_by as doneBy, at from corrections
        where subject_kind = 'weigh-in' and subject_id = ?`,
    ).get(id) as
      | { reason: string | null; replacementId: string | null; doneBy: string; at: number }
      | undefined;
    return {
      ...stored,
      ...names,
      byName: helperName(db, stored.doneBy),
      correction: correction
        ? {
            reason: correction.reason,
            replacementId: correction.replacementId,
            byName: helperName(db, correction.doneBy),
            at: correction.at,
          }
        : null,
      later: stored.actId === null ? { uses: [], count: 0 } : listLaterUses(db, stored.actId),
    };
  });
}

/** Second readings that nobody has decided about, oldest first. */
export function listForReview(
  ctx: Context,
  _input: z.output<typeof listForReviewEndpoint.input> = {},
): z.output<typeof listForReviewEndpoint.output> {
  allow(ctx, "weighing.review");
  return inSnapshot(ctx, (db) => {
    const rows = prepared(
      db.client,
      `select w.id, b.code, p.name as pointName, w.net_grams as netGrams, w.occurred_at as occurredAt,
         w.done_by as doneBy, one.id as firstId, one.net_grams as firstGrams, one.occurred_at as firstAt,
         one.done_by as firstBy
        from weigh_ins w join bags b on b.id = w.bag_id join points p on p.id = w.point_id
          left join weigh_ins one on one.bag_id = w.bag_id and one.state = 'posted'
        where w.state = 'for-review' order by w.recorded_at, w.id limit 200`,
    ).all() as {
      id: string;
      code: string;
      pointName: string;
      netGrams: number;
      occurredAt: number;
      doneBy: string;
      firstId: string | null;
      firstGrams: number;
      firstAt: number;
      firstBy: string;
    }[];
    return {
      readings: rows.map(({ doneBy, firstId, firstGrams, firstAt, firstBy, ...row }) => ({
        ...row,
        byName: helperName(db, doneBy),
        first:
          firstId === null
            ? null
            : {
                id: firstId,
                netGrams: firstGrams,
                occurredAt: firstAt,
                byName: helperName(db, firstBy),
              },
      })),
    };
  });
}
