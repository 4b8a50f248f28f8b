"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import {
  addPointEndpoint,
  addPointSchema,
  changePointEndpoint,
  type PointReceipt,
} from "@/lib/points/contract";
import { CHOSEN_POINT_KINDS, POINT_KIND_NAMES } from "@/lib/points/terms";

const schema = addPointSchema.omit({ requestId: true });
type Typed = z.input<typeof schema>;

const KINDS = CHOSEN_POINT_KINDS.map((kind) => ({ value: kind, label: POINT_KIND_NAMES[kind] }));

type PointDialogProps = {
  /** null: a new one. */
  point: PointReceipt | null;
  onClose: () => void;
  onSaved: (name: string) => void;
};

/** Adds a drop-off point or changes one. */
export function PointDialog({ point, onClose, onSaved }: PointDialogProps) {
  const add = useCommand(addPointEndpoint);
  const change = useCommand(changePointEndpoint);
  const command = point ? change : add;
  const { register, handleSubmit, formState } = useForm<Typed, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema),
    defaultValues: {
      name: point?.name ?? "",
      kind: CHOSEN_POINT_KINDS.find((kind) => kind === point?.kind) ?? "other",
    },
  });
  const save = handleSubmit(async (values) => {
    const result = point
      ? await change.send({ ...values, pointId: point.id })
      : await add.send(values);
    if (result.kind === "done") onSaved(result.receipt.name);
  });
  const errorOf = (field: keyof Typed) => {
    const code = formState.errors[field]?.message;
    return code ? fieldSentence(code) : command.fieldErrors[field];
  };
  return (
    <FormDialog
      title={point ? `Change ${point.name}` : "Add a drop-off point"}
      submit={point ? "Save changes" : "Add the point"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={["name", "kind"]}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As people call the place, such as Harbour Road Library."
        error={errorOf("name")}
        maxLength={80}
        autoComplete="off"
      />
      <SelectField {...register("kind")} label="Kind" options={KINDS} error={errorOf("kind")} />
    </FormDialog>
  );
}
