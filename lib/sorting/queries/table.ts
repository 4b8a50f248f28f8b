/** What lies on the sorting table: a weighed bag with the readings behind its net. */
import "server-only";
import type { LabelCode } from "@/lib/core/bag-code";
import type { BagId, ScaleId, SortingId, WeighInId } from "@/lib/core/ids";
import type { PolymerAnswer } from "@/lib/core/plastics";
import type { Instant } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";
import { getScale } from "@/lib/scales/queries/scales";
import { loadsOf, type Load } from "@/lib/scales/rules/loads";
import type { Reading } from "@/lib/scales/rules/reading";
import type { Condition } from "@/lib/weighing/terms";

export type WeighedBag = {
  weighInId: WeighInId;
  holderId: number;
  scaleId: ScaleId;
  occurredAt: Instant;
  recordedAt: Instant;
  condition: Condition;
  polymer: PolymerAnswer;
};

/** The weigh-in that counts and the bag's holder in the ledger; null for a bag that was never weighed. */
export function getWeighedBag(db: Readable, bagId: BagId, code: LabelCode): WeighedBag | null {
  const row = prepared(
    db.client,
    `select w.id as weighInId, h.id as holderId, w.scale_id as scaleId, w.occurred_at as occurredAt,
            w.recorded_at as recordedAt, w.condition, w.polymer
       from weigh_ins w join holders h on h.code = @code
      where w.bag_id = @bagId and w.state = 'posted'`,
  ).get({ bagId, code });
  return (row as WeighedBag | undefined) ?? null;
}

/** The bags of a session, in the order of their codes. */
export function listBagsOf(db: Readable, sortingId: SortingId): { id: BagId; code: LabelCode }[] {
  return prepared(
    db.client,
    `select b.id, b.code from sorting_bags sb join bags b on b.id = sb.bag_id
      where sb.session_id = ? order by b.code`,
  ).all(sortingId) as { id: BagId; code: LabelCode }[];
}

/** The readings of a weigh-in as loads on its scale; they belong to the tolerance of its sorting. */
export function listLoads(db: Readable, bag: WeighedBag): Load[] {
  const scale = getScale(db, bag.scaleId);
  if (!scale) return [];
  const readings = prepared(
    db.client,
    `select gross_mg as grossMilligrams, container_id as containerId,
            container_tare_mg as containerTareMilligrams, sack_id as sackId, sack_tare_mg as sackTareMilligrams
       from weigh_in_readings where weigh_in_id = ? order by seq`,
  ).all(bag.weighInId) as Reading[];
  const {
    class: scaleClass,
    maxMilligrams,
    eMilligrams,
    dMilligrams,
    statedAccuracyMilligrams,
  } = scale;
  const spec = {
    class: scaleClass,
    maxMilligrams,
    eMilligrams,
    dMilligrams,
    statedAccuracyMilligrams,
  };
  return readings.flatMap((reading) => loadsOf(reading, spec));
}
