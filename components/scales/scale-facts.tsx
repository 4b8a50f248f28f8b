"use client";

import { useWatch, type Control } from "react-hook-form";
import type * as z from "zod";
import { Notice } from "@/components/ui/notice";
import { formatStep } from "@/lib/core/mass";
import { sentence } from "@/lib/core/messages";
import { scaleDataSchema } from "@/lib/scales/contract/scales";
import {
  checkScale,
  minimumCapacity,
  mpeInService,
  problemValues,
  specOf,
  type ScaleSpec,
} from "@/lib/scales/rules/scale";

type Values = z.input<typeof scaleDataSchema>;

/** What follows from a plate's data, or what in it cannot be right, while it is typed. */
export function ScaleFacts({
  control,
}: {
  control: Control<Values, unknown, z.output<typeof scaleDataSchema>>;
}) {
  const values = useWatch({ control });
  // The name does not matter here and may still be missing.
  const parsed = scaleDataSchema.safeParse({ ...values, name: "-" });
  if (!parsed.success) return null;
  const spec = specOf(parsed.data);
  const problem = checkScale(spec);
  if (problem) {
    return <Notice tone="warn">{sentence(problem.code, problemValues(problem))}</Notice>;
  }
  return (
    <Notice tone="info" title="What this scale can tell">
      {factsOf(spec)}
    </Notice>
  );
}

function factsOf(scale: ScaleSpec): string {
  const atMax = formatStep(mpeInService(scale, scale.maxMilligrams));
  if (scale.class === "none") return `Every reading to ± ${atMax}.`;
  const least = minimumCapacity(scale);
  return `From ${formatStep(least)} (smaller loads are marked) to ± ${formatStep(mpeInService(scale, least))}, at ${formatStep(scale.maxMilligrams)} to ± ${atMax}.`;
}
