import "server-only";
import type { BagId, LotId, PersonId, PointId, ScaleId, WeighInId } from "@/lib/core/ids";
import type { Kind, PolymerAnswer } from "@/lib/core/plastics";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import type { Basis } from "@/lib/ledger/terms";
import { prepared, type Tx } from "@/lib/platform/database";
import type { Condition, WeighInState } from "../terms";

export type WeighInRow = {
  id: WeighInId;
  bagId: BagId;
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
  lotId: LotId | null;
  actId: number | null;
  /** The weigh-in in whose place it stands. */
  corrects?: WeighInId;
  readings: readonly ReadingInput[];
};

/** Writes the record of a weigh ticket with its readings. */
export function insertWeighIn(tx: Tx, row: WeighInRow): WeighInId {
  prepared(
    tx.client,
    `insert into weigh_ins (id, bag_id, point_id, scale_id, done_by, occurred_at, recorded_at, state, net_grams,
       mpe_mg, basis, below_minimum, condition, polymer, kind, colour_code, one_kind, lot_id, act_id, corrects)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    row.id,
    row.bagId,
    row.pointId,
    row.scaleId,
    row.doneBy,
    row.occurredAt,
    row.recordedAt,
    row.state,
    row.netGrams,
    row.mpeMilligrams,
    row.basis,
    row.belowMinimum ? 1 : 0,
    row.condition,
    row.polymer,
    row.kind,
    row.colourCode,
    row.oneKind ? 1 : 0,
    row.lotId,
    row.actId,
    row.corrects ?? null,
  );
  const insert = prepared(
    tx.client,
    `insert into weigh_in_readings (weigh_in_id, seq, gross_mg, container_id, container_tare_mg, sack_id, sack_tare_mg)
     values (?, ?, ?, ?, ?, ?, ?)`,
  );
  row.readings.forEach((reading, index) =>
    insert.run(
      row.id,
      index + 1,
      reading.grossMilligrams,
      reading.containerId,
      reading.containerTareMilligrams,
      reading.sackId,
      reading.sackTareMilligrams,
    ),
  );
  return row.id;
}
