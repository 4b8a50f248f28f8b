/** A weighing as a client sends it, read against the lists: the scale of its day, the tares of its day. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { ScaleId } from "@/lib/core/ids";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import type { Basis } from "@/lib/ledger/terms";
import type { Readable } from "@/lib/platform/database";
import { basisOf, requireScale, withListedTares } from "@/lib/scales/queries/instruments";
import { loadsOf, type Load } from "@/lib/scales/rules/loads";
import { mpeOf, netGramsOf, refuseReadings, tareMilligrams } from "@/lib/scales/rules/reading";
import type { WeighedInput } from "../contract/weighed";

export type Weighed = {
  scaleId: ScaleId;
  /** The number under which the ledger knows the scale. */
  scaleNumber: number;
  basis: Basis;
  /** Sums over the readings. */
  grossMilligrams: number;
  tareMilligrams: number;
  netGrams: number;
  mpeMilligrams: number;
  loads: Load[];
};

type Path = readonly (string | number)[];

/**
 * @param occurredAt when the scale was read
 * @param path of the weighing in the input
 * @throws AppError `unknown-scale`, `unknown-container`, `above-max`, `not-a-step`, `tare-above-gross`, `net-zero`,
 *   each with the path of the field
 */
export function readWeighed(
  db: Readable,
  input: WeighedInput,
  occurredAt: Instant,
  path: Path,
): Weighed {
  const scale = requireScale(db, input.scaleId, occurredAt, [...path, "scaleId"]);
  const readings = input.readings.map(
    (reading, at) => withListedTares(db, reading, occurredAt, [...path, "readings", at]).reading,
  );
  const refusal = refuseReadings(scale, readings);
  if (refusal) throw new AppError(refusal.code, refusal.detail, [...path, ...refusal.path]);
  return {
    scaleId: scale.id,
    scaleNumber: scale.number,
    basis: basisOf(db, scale.id, occurredAt),
    grossMilligrams: readings.reduce((sum, reading) => sum + reading.grossMilligrams, 0),
    tareMilligrams: readings.reduce((sum, reading) => sum + tareMilligrams(reading), 0),
    netGrams: netGramsOf(readings),
    mpeMilligrams: mpeOf(scale, readings),
    loads: readings.flatMap((reading) => loadsOf(reading, scale)),
  };
}

/** One reading by itself; the path is that of the reading. */
export function readOne(
  db: Readable,
  scaleId: ScaleId,
  reading: ReadingInput,
  occurredAt: Instant,
  path: Path,
  field: string,
): Weighed {
  try {
    return readWeighed(db, { scaleId, readings: [reading] }, occurredAt, path);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    // "…readings.0.grossMilligrams" is "…reading.grossMilligrams" where there is one only.
    const at = error.path.indexOf("readings");
    if (at < 0) throw error;
    const rest = error.path.slice(at + 2);
    throw new AppError(error.code, error.detail, [...error.path.slice(0, at), field, ...rest]);
  }
}
