/** The scale and the tares that a ticket names, as the lists have them. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import type { Tx } from "@/lib/platform/database";
import { getContainer, getScale, type Scale } from "@/lib/scales/queries";
import type { TareKind } from "@/lib/scales/terms";
import type { ReadingInput } from "@/lib/core/schemas";
import type { WeighInInput, WeighInReceipt } from "../contract";

/** A reading whose listed tares are the lists' own. */
export type StoredReading = ReadingInput;
type TareChanges = Extract<WeighInReceipt, { kind: "posted" }>["tareChanges"];

/**
 * A client's tare of a listed container is only what it believed: the stored one counts, and where they differ
 * the receipt says so. What left the lists after the scale was read (a ticket that waited) is still good.
 *
 * @throws AppError `unknown-scale`, `unknown-container`
 */
export function readInstruments(
  tx: Tx,
  input: Pick<WeighInInput, "scaleId" | "readings" | "occurredAt">,
): { scale: Scale; readings: StoredReading[]; tareChanges: TareChanges } {
  const inUse = (thing: { retiredAt: number | null }): boolean =>
    thing.retiredAt === null || thing.retiredAt > input.occurredAt;
  const scale = getScale(tx, input.scaleId);
  if (!scale || !inUse(scale)) throw new AppError("unknown-scale", {}, ["scaleId"]);

  const tareChanges: TareChanges = [];
  const listed = (
    index: number,
    part: TareKind,
    id: Id<"container"> | null,
    sentMilligrams: number,
  ): number => {
    if (id === null) return sentMilligrams;
    const container = getContainer(tx, id);
    if (!container || container.kind !== part || !inUse(container)) {
      throw new AppError("unknown-container", {}, ["readings", index, `${part}Id`]);
    }
    const usedMilligrams = container.tareMilligrams;
    if (usedMilligrams !== sentMilligrams) {
      tareChanges.push({ reading: index, part, sentMilligrams, usedMilligrams });
    }
    return usedMilligrams;
  };
  const readings = input.readings.map((reading, index) => ({
    ...reading,
    containerTareMilligrams: listed(
      index,
      "container",
      reading.containerId,
      reading.containerTareMilligrams,
    ),
    sackTareMilligrams: listed(index, "sack", reading.sackId, reading.sackTareMilligrams),
  }));
  return { scale, readings, tareChanges };
}
