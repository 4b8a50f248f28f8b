"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch, type FieldErrors } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import {
  addScaleEndpoint,
  changeScaleEndpoint,
  scaleDataSchema,
  type ScaleReceipt,
} from "@/lib/scales/contract/scales";
import { SCALE_CLASS_NAMES, SCALE_CLASSES } from "@/lib/scales/terms";
import { MassInput } from "./mass-input";
import { ScaleFacts } from "./scale-facts";

type Typed = z.input<typeof scaleDataSchema>;
type Field =
  "name" | "class" | "maxMilligrams" | "dMilligrams" | "eMilligrams" | "statedAccuracyMilligrams";
const FIELDS: readonly Field[] = [
  "name",
  "class",
  "maxMilligrams",
  "dMilligrams",
  "eMilligrams",
  "statedAccuracyMilligrams",
];
const CLASSES = SCALE_CLASSES.map((value) => ({
  value,
  label:
    value === "none" ? "Not verified, accuracy as stated by its maker" : SCALE_CLASS_NAMES[value],
}));

type ScaleDialogProps = {
  /** null: a new one. */
  scale: ScaleReceipt | null;
  onClose: () => void;
  onSaved: (name: string) => void;
};

/** Adds a scale or changes one: what stands on its plate. */
export function ScaleDialog({ scale, onClose, onSaved }: ScaleDialogProps) {
  const add = useCommand(addScaleEndpoint);
  const change = useCommand(changeScaleEndpoint);
  const command = scale ? change : add;
  const { register, control, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof scaleDataSchema>
  >({
    resolver: zodResolver(scaleDataSchema),
    shouldUnregister: true,
    defaultValues: scale ? typedOf(scale) : { class: "III" },
  });
  const scaleClass = useWatch({ control, name: "class" });
  const save = handleSubmit(async (values) => {
    const result = scale
      ? await change.send({ ...values, scaleId: scale.id })
      : await add.send(values);
    if (result.kind === "done") onSaved(result.receipt.name);
  });
  const errors: FieldErrors<Record<Field, unknown>> = formState.errors;
  const errorOf = (field: Field) => {
    const issue = errors[field]?.message;
    if (!issue) return command.fieldErrors[field];
    // The schema library's own words for a missing number; the field says the rest.
    return fieldSentence(/^[a-z][a-z-]*$/.test(issue) ? issue : "empty");
  };
  const mass = (name: Exclude<Field, "name" | "class">, label: string, unit: "kg" | "g") => (
    <MassInput
      key={name}
      control={control}
      name={name}
      label={label}
      unit={unit}
      error={errorOf(name)}
    />
  );
  return (
    <FormDialog
      title={scale ? `Change ${scale.name}` : "Add a scale"}
      submit={scale ? "Save changes" : "Add the scale"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={FIELDS}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As helpers call it, such as Bench scale."
        error={errorOf("name")}
        maxLength={60}
        autoComplete="off"
      />
      <SelectField
        {...register("class")}
        label="Class"
        hint="On the plate of a verified scale as III or IIII in an oval."
        options={CLASSES}
        error={errorOf("class")}
      />
      <div className="grid gap-x-4 gap-y-2 wide:grid-cols-2">
        {mass("maxMilligrams", "Max", "kg")}
        {mass("dMilligrams", "Step of the display, d", "g")}
        {scaleClass === "none"
          ? mass("statedAccuracyMilligrams", "Stated accuracy, ±", "g")
          : mass("eMilligrams", "Verification interval, e", "g")}
      </div>
      <ScaleFacts control={control} />
    </FormDialog>
  );
}

function typedOf(scale: ScaleReceipt): Typed {
  const { name, maxMilligrams, dMilligrams } = scale;
  return scale.class === "none"
    ? {
        name,
        maxMilligrams,
        dMilligrams,
        class: scale.class,
        statedAccuracyMilligrams: scale.statedAccuracyMilligrams ?? 0,
      }
    : { name, maxMilligrams, dMilligrams, class: scale.class, eMilligrams: scale.eMilligrams ?? 0 };
}
