/** What stands in the weigh-in form, as typed. Plain data. */
import { formatCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import type { Kind, PolymerAnswer } from "@/lib/core/plastics";
import { kilogramText } from "./kilogram-text";
import type { WeighInEndpointInput } from "./weigh-in-body";
import type { Condition } from "@/lib/weighing/terms";

/** A tare: the id of a listed thing, "" for none, "typed" with a text. */
export type TareValue = { choice: string; text: string };
export type ReadingValue = { gross: string; container: TareValue; sack: TareValue };

export type FormValues = {
  /**
   * UUIDv7: the request's id and the id of the weigh-in. It is there from the start, so that a photo belongs to
   * this bag and to no other, whether it or the ticket arrives first.
   */
  id: string;
  code: string;
  /** For a tag without a point. */
  pointId: string;
  scaleId: string;
  readings: ReadingValue[];
  polymer: PolymerAnswer;
  kind: Kind | "";
  colourCode: string;
  oneKind: boolean;
  condition: Condition;
  /** Photos were taken for it, so that they are shown again. */
  photos: boolean;
};

export const NO_TARE: TareValue = { choice: "", text: "" };
export const TYPED = "typed";

/** What can be said of a bag once and said again for the next: "Same as last". */
export type Answers = Pick<FormValues, "polymer" | "kind" | "colourCode" | "oneKind" | "condition">;
export const FIRST_ANSWERS: Answers = {
  polymer: "mixed",
  kind: "",
  colourCode: "",
  oneKind: false,
  condition: "clean",
};

export function emptyReading(like?: ReadingValue): ReadingValue {
  return { gross: "", container: like?.container ?? NO_TARE, sack: like?.sack ?? NO_TARE };
}

/** The form for the next bag: the scale and the last tares stay, everything about the bag is new. */
export function nextForm(scaleId: string, like?: ReadingValue): FormValues {
  return {
    id: newId(),
    code: "",
    pointId: "",
    scaleId,
    readings: [emptyReading(like)],
    photos: false,
    ...FIRST_ANSWERS,
  };
}

/** Has anything been typed, or photographed, that would be lost? */
export function isTouched({ code, readings, photos }: FormValues): boolean {
  return photos || code.trim() !== "" || readings.some(({ gross }) => gross.trim() !== "");
}

/** A body taken back into the form, as when a refused ticket is edited. */
export function valuesOf(input: WeighInEndpointInput): FormValues {
  const tare = (id: string | null, milligrams: number): TareValue => {
    if (id !== null) return { choice: id, text: "" };
    return milligrams === 0 ? NO_TARE : { choice: TYPED, text: kilogramText(milligrams) };
  };
  return {
    // The same ticket under the same id: the server kept nothing of it, and its photos wait for it.
    id: input.requestId,
    photos: true,
    code: formatCode(input.code),
    pointId: input.pointId ?? "",
    scaleId: input.scaleId,
    readings: input.readings.map((reading) => ({
      gross: kilogramText(reading.grossMilligrams),
      container: tare(reading.containerId, reading.containerTareMilligrams),
      sack: tare(reading.sackId, reading.sackTareMilligrams),
    })),
    polymer: input.polymer ?? "mixed",
    kind: input.kind ?? "",
    colourCode: input.colourCode ?? "",
    oneKind: input.oneKind ?? false,
    condition: input.condition ?? "clean",
  };
}

/** What a waiting ticket is known by: "K7Q2-9F4M, 2.160 kg". */
export function labelOf(code: string, netGrams: number): string {
  return `${formatCode(code)}, ${formatKg(netGrams)} kg`;
}
