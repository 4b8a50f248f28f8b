/** One weighing of a container as typed: a scale and a reading or several, and what they come to. */
import type { WeighedInput } from "@/lib/stock/contract/weighed";
import { netGramsOf, type Reading } from "@/lib/scales/rules/reading";
import { emptyReading, NO_TARE, type ReadingValue } from "../weighing/form-values";
import { readReading, type ListedTare } from "../weighing/read-form";

export type WeighingValue = { scaleId: string; readings: ReadingValue[] };

/** An empty weighing: with the tare of the lot's own container, where that is known. */
export function firstWeighing(scaleId: string, containerId: string | null = null): WeighingValue {
  const container = containerId === null ? NO_TARE : { choice: containerId, text: "" };
  return { scaleId, readings: [{ gross: "", container, sack: NO_TARE }] };
}

/** Another reading with the last one's tares. */
export function withReading({ scaleId, readings }: WeighingValue): WeighingValue {
  return { scaleId, readings: [...readings, emptyReading(readings.at(-1))] };
}

function readingsOf(value: WeighingValue, tares: readonly ListedTare[]): Reading[] | null {
  const read = value.readings.map((reading) => readReading(reading, tares));
  return read.every((one) => one.ok) ? read.map(({ reading }) => reading) : null;
}

/** Net in grams; null while a reading cannot be read. */
export function netOfWeighing(value: WeighingValue, tares: readonly ListedTare[]): number | null {
  const readings = readingsOf(value, tares);
  return readings && netGramsOf(readings);
}

/** As the endpoints take it; null while it is incomplete. The ids come from this program's lists; the server checks each. */
export function sentWeighing(
  value: WeighingValue,
  tares: readonly ListedTare[],
): WeighedInput | null {
  const readings = readingsOf(value, tares);
  return readings && value.scaleId !== ""
    ? ({ scaleId: value.scaleId, readings } as WeighedInput)
    : null;
}
