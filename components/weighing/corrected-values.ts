/** A saved weigh-in in the form's fields, and the form's fields as a correction of it. */
import type * as z from "zod";
import { newId, type Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import type { correctedWeighInSchema, WeighInPage } from "@/lib/weighing/contract/corrections";
import { TYPED, valuesOf, type FormValues } from "./form-values";
import { kilogramText } from "./kilogram-text";
import type { ListedTare, ReadForm } from "./read-form";

/** Tares as they were for this weigh-in: a container that was weighed anew since keeps what it had then. */
export function taresOf(
  listed: readonly ListedTare[],
  { readings }: Pick<WeighInPage, "readings">,
): ListedTare[] {
  const then = new Map<string, number>();
  for (const reading of readings) {
    if (reading.containerId) then.set(reading.containerId, reading.containerTareMilligrams);
    if (reading.sackId) then.set(reading.sackId, reading.sackTareMilligrams);
  }
  return listed.map((tare) => ({
    ...tare,
    tareMilligrams: then.get(tare.id) ?? tare.tareMilligrams,
  }));
}

/** A container that is in no list any more stands as its typed weight. */
export function valuesOfWeighIn(
  weighIn: WeighInPage,
  listed: readonly Pick<ListedTare, "id">[],
): FormValues {
  const { polymer, kind, colourCode, oneKind, condition, scaleId, pointId, code } = weighIn;
  const values = valuesOf({
    requestId: newId(),
    code,
    scaleId,
    pointId,
    occurredAt: weighIn.occurredAt,
    readings: weighIn.readings,
    polymer,
    kind,
    colourCode,
    oneKind,
    condition,
  });
  const isListed = (id: string) => listed.some((one) => one.id === id);
  return {
    ...values,
    photos: false,
    readings: values.readings.map((value, at) => {
      const { containerTareMilligrams = 0, sackTareMilligrams = 0 } = weighIn.readings[at] ?? {};
      const keep = (tare: typeof value.container, milligrams: number) =>
        tare.choice === "" || tare.choice === TYPED || isListed(tare.choice)
          ? tare
          : { choice: TYPED, text: kilogramText(milligrams) };
      return {
        ...value,
        container: keep(value.container, containerTareMilligrams),
        sack: keep(value.sack, sackTareMilligrams),
      };
    }),
  };
}

/** What should have been saved, as the endpoint takes it. A kind belongs to a bag of one kind only. */
export function replacementOf(
  values: FormValues,
  { readings }: Extract<ReadForm, { ok: true }>,
  occurredAt: Instant,
): z.input<typeof correctedWeighInSchema> {
  const { polymer, kind, colourCode, oneKind, condition } = values;
  return {
    scaleId: values.scaleId,
    pointId: values.pointId,
    occurredAt,
    readings: readings.map((reading) => ({
      ...reading,
      // The ids come from the lists of this program; the server checks each.
      containerId: reading.containerId as Id<"container"> | null,
      sackId: reading.sackId as Id<"container"> | null,
    })),
    polymer,
    kind: oneKind ? kind || null : null,
    colourCode: colourCode || null,
    oneKind,
    condition,
  };
}
