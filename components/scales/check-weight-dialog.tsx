"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import { lineSchema } from "@/lib/core/schemas";
import { addCheckWeightEndpoint } from "@/lib/scales/contract/checks";
import { loadSchema } from "@/lib/scales/contract/scales";
import { MassInput } from "./mass-input";

const schema = z.object({
  name: lineSchema(60),
  massMilligrams: loadSchema,
  evidence: lineSchema(200),
});
type Typed = z.input<typeof schema>;

type Props = { onClose: () => void; onSaved: () => void };

/** Adds a check weight: what it is, what it weighs, and how that is known. */
export function CheckWeightDialog({ onClose, onSaved }: Props) {
  const add = useCommand(addCheckWeightEndpoint);
  const { register, control, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof schema>
  >({ resolver: zodResolver(schema) });
  const save = handleSubmit(async (values) => {
    const result = await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) => {
    const issue = formState.errors[field]?.message;
    if (!issue) return add.fieldErrors[field];
    return fieldSentence(/^[a-z][a-z-]*$/.test(issue) ? issue : "empty");
  };
  return (
    <FormDialog
      title="Add a check weight"
      submit="Add it"
      onSubmit={save}
      onClose={onClose}
      command={add}
      shownFields={["name", "massMilligrams", "evidence"]}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As helpers call it, such as Green dumbbell."
        error={errorOf("name")}
        maxLength={60}
        autoComplete="off"
      />
      <MassInput
        control={control}
        name="massMilligrams"
        label="Mass"
        unit="kg"
        error={errorOf("massMilligrams")}
      />
      <TextField
        {...register("evidence")}
        label="Known from"
        hint="Number of its certificate, or on which verified scale it was weighed and when."
        error={errorOf("evidence")}
        maxLength={200}
        autoComplete="off"
      />
    </FormDialog>
  );
}
