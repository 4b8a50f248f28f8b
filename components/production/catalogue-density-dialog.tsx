"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { TextField } from "@/components/ui/text-field";
import { formatMeasure } from "@/lib/core/measure";
import {
  ownDensitySchema,
  setDensityEndpoint,
  type Density,
} from "@/lib/production/contract/catalogue";
import { REFERENCE } from "@/lib/production/rules/reference";
import { fieldError } from "./catalogue-field-error";
import { polymerName } from "./catalogue-words";

type Typed = z.input<typeof ownDensitySchema>;
type Props = { density: Density; onClose: () => void; onSaved: () => void };

/** The scheme's own density of a polymer, with where it is from. */
export function CatalogueDensityDialog({ density, onClose, onSaved }: Props) {
  const set = useCommand(setDensityEndpoint);
  const { polymer, mgPerCm3, source, own } = density;
  const reference = REFERENCE[polymer];
  const { register, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof ownDensitySchema>
  >({
    resolver: zodResolver(ownDensitySchema),
    defaultValues: {
      mgPerCm3: formatMeasure(mgPerCm3, "density"),
      source: own ? source : "",
    },
  });
  const save = handleSubmit(async (values) => {
    const result = await set.send({ ...values, polymer });
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) =>
    fieldError(formState.errors[field], set.fieldErrors[field]);
  return (
    <FormDialog
      title={`Density of ${polymerName(polymer)}`}
      submit="Plan with this"
      onSubmit={save}
      onClose={onClose}
      command={set}
      shownFields={["mgPerCm3", "source"]}
    >
      <p className="text-soft">
        The reference is {formatMeasure(reference.mgPerCm3, "density")} g/cm³, {reference.source}.
        Plans that are saved keep their figures.
      </p>
      <TextField
        {...register("mgPerCm3")}
        label="Density"
        unit="g/cm³"
        mono
        inputMode="decimal"
        autoComplete="off"
        className="[&_input]:pr-20"
        error={errorOf("mgPerCm3")}
      />
      <TextField
        {...register("source")}
        label="Where it is from"
        hint="Such as: own sheet measured and weighed, 12 May."
        maxLength={120}
        autoComplete="off"
        error={errorOf("source")}
      />
    </FormDialog>
  );
}
