"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import * as z from "zod";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { TextField } from "@/components/ui/text-field";
import { formatKg } from "@/lib/core/mass";
import { fieldSentence } from "@/lib/core/messages";
import {
  setLimitsEndpoint,
  setLimitsSchema,
  type StorageStanding,
} from "@/lib/stock/contract/limits";

const limits = setLimitsSchema.omit({ requestId: true }).shape;
/** An empty field is no limit; a figure is a whole number. */
const typed = <Limit extends z.ZodType<number | null>>(limit: Limit) =>
  z
    .string()
    .trim()
    .refine((text) => /^\d*$/.test(text), "whole-number")
    .transform((text) => (text === "" ? null : Number(text)))
    .pipe(limit as unknown as z.ZodType<number | null, number | null>);
const schema = z.object({
  lotWeeks: typed(limits.lotWeeks),
  storageKg: typed(limits.storageKg),
  storageDays: typed(limits.storageDays),
  reservationDays: z
    .string()
    .trim()
    .regex(/^\d{1,4}$/, "whole-number")
    .transform(Number)
    .pipe(z.number().min(1, "too-few").max(365, "too-large")),
});
type Typed = z.input<typeof schema>;

const FIELDS = ["lotWeeks", "storageKg", "storageDays", "reservationDays"] as const;

/** Age at which a lot closes, and the shed's storage limits. */
export function LimitsForm({ standing }: { standing: StorageStanding }) {
  const save = useCommand(setLimitsEndpoint);
  const [saved, setSaved] = useState(false);
  const { register, handleSubmit, formState } = useForm<Typed, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema),
    defaultValues: {
      lotWeeks: standing.limits.lotWeeks?.toString() ?? "",
      storageKg: standing.limits.storageKg?.toString() ?? "",
      storageDays: standing.limits.storageDays?.toString() ?? "",
      reservationDays: String(standing.limits.reservationDays),
    },
  });
  const submit = handleSubmit(async (values) => {
    setSaved(false);
    const result = await save.send(values);
    setSaved(result.kind === "done");
  });
  const errorOf = (field: (typeof FIELDS)[number]) => {
    const code = formState.errors[field]?.message;
    return code ? fieldSentence(code) : save.fieldErrors[field];
  };
  return (
    <form
      onSubmit={submit}
      noValidate
      className="grid gap-4 rounded-ticket border border-rule bg-card p-4 wide:max-w-xl wide:p-6"
    >
      <CommandNotice command={save} shownFields={FIELDS} />
      {saved ? <Notice tone="ok">Saved.</Notice> : null}
      <TextField
        {...register("lotWeeks")}
        label="A lot closes after"
        unit="weeks"
        inputMode="numeric"
        hint="The next one opens by itself, so that nothing lies at the bottom for ever."
        error={errorOf("lotWeeks")}
      />
      <TextField
        {...register("storageKg")}
        label="Most that may lie in the shed"
        unit="kg"
        inputMode="numeric"
        hint={`Now ${formatKg(standing.heldGrams, 1)} kg. Take the figure from your permit or from whoever looks after fire safety; Today tells from 80 % on.`}
        error={errorOf("storageKg")}
      />
      <TextField
        {...register("storageDays")}
        label="Longest that anything may lie there"
        unit="days"
        inputMode="numeric"
        hint={`The oldest has lain here for ${standing.oldestDays} days.`}
        error={errorOf("storageDays")}
      />
      <TextField
        {...register("reservationDays")}
        label="A reservation lapses after"
        unit="days"
        inputMode="numeric"
        hint="A mail to whoever reserved goes out the day before; prolonging counts from that day on."
        error={errorOf("reservationDays")}
      />
      <Button type="submit" busy={save.pending}>
        Save the limits
      </Button>
    </form>
  );
}
