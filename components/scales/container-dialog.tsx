"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import {
  addContainerEndpoint,
  addContainerSchema,
  changeContainerEndpoint,
  type ContainerReceipt,
} from "@/lib/scales/contract/containers";
import { TARE_KIND_NAMES, TARE_KINDS } from "@/lib/scales/terms";
import { MassInput } from "./mass-input";

const schema = addContainerSchema.omit({ requestId: true });
type Typed = z.input<typeof schema>;
const KINDS = TARE_KINDS.map((value) => ({ value, label: TARE_KIND_NAMES[value] }));

type ContainerDialogProps = {
  /** null: a new one. */
  container: ContainerReceipt | null;
  onClose: () => void;
  onSaved: (name: string) => void;
};

/** Adds a container or sack, or changes one. */
export function ContainerDialog({ container, onClose, onSaved }: ContainerDialogProps) {
  const add = useCommand(addContainerEndpoint);
  const change = useCommand(changeContainerEndpoint);
  const command = container ? change : add;
  const { register, control, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof schema>
  >({
    resolver: zodResolver(schema),
    defaultValues: container
      ? { name: container.name, kind: container.kind, tareMilligrams: container.tareMilligrams }
      : { kind: "container" },
  });
  const save = handleSubmit(async ({ kind, name, tareMilligrams }) => {
    const result = container
      ? await change.send({ containerId: container.id, name, tareMilligrams })
      : await add.send({ kind, name, tareMilligrams });
    if (result.kind === "done") onSaved(result.receipt.name);
  });
  const errorOf = (field: keyof Typed) => {
    const issue = formState.errors[field]?.message;
    if (!issue) return command.fieldErrors[field];
    return fieldSentence(/^[a-z][a-z-]*$/.test(issue) ? issue : "empty");
  };
  return (
    <FormDialog
      title={container ? `Change ${container.name}` : "Add a container or sack"}
      submit={container ? "Save changes" : "Add it"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={["name", "kind", "tareMilligrams"]}
    >
      {container ? null : (
        <ChoiceTiles
          {...register("kind")}
          legend="Kind"
          hint="A container gets a label of its own: scanning it sets the tare."
          choices={KINDS}
          columns={2}
          defaultValue="container"
          error={errorOf("kind")}
        />
      )}
      <TextField
        {...register("name")}
        label="Name"
        hint="Such as Blue crate 1, or Rubble sack."
        error={errorOf("name")}
        maxLength={60}
        autoComplete="off"
      />
      <MassInput
        control={control}
        name="tareMilligrams"
        label="Empty weight"
        unit="kg"
        error={errorOf("tareMilligrams")}
      />
    </FormDialog>
  );
}
