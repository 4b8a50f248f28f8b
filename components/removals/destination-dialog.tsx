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
  addDestinationEndpoint,
  changeDestinationEndpoint,
  destinationDataSchema,
  type Destination,
} from "@/lib/removals/contract/destinations";
import { ROUTE_NAMES, ROUTES } from "@/lib/removals/terms";
import { LocalRules } from "./local-rules";

type Typed = z.input<typeof destinationDataSchema>;
const CHOICES = ROUTES.map((value) => ({ value, label: ROUTE_NAMES[value] }));
const FIELDS: readonly (keyof Typed)[] = [
  "name",
  "route",
  "receiverNumber",
  "carrierName",
  "carrierNumber",
  "permitUntil",
  "wasteCode",
];

type Props = {
  /** null: a new one. */
  destination: Destination | null;
  onClose: () => void;
  onSaved: () => void;
};

/** Adds a destination or changes one. */
export function DestinationDialog({ destination, onClose, onSaved }: Props) {
  const add = useCommand(addDestinationEndpoint);
  const change = useCommand(changeDestinationEndpoint);
  const command = destination ? change : add;
  const { register, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof destinationDataSchema>
  >({
    resolver: zodResolver(destinationDataSchema),
    defaultValues: destination ?? {
      name: "",
      route: "disposed",
      receiverNumber: "",
      carrierName: "",
      carrierNumber: "",
      permitUntil: null,
      wasteCode: "",
    },
  });
  const save = handleSubmit(async (values) => {
    const result = destination
      ? await change.send({ ...values, destinationId: destination.id })
      : await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) => {
    const issue = formState.errors[field]?.message;
    return issue ? fieldSentence(issue) : command.fieldErrors[field];
  };
  return (
    <FormDialog
      title={destination ? `Change ${destination.name}` : "Add a destination"}
      submit={destination ? "Save changes" : "Add it"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={FIELDS}
    >
      <ChoiceTiles
        {...register("route")}
        legend="Route"
        hint="Passed on: another recycler makes something of it. Disposed of: burnt or buried."
        columns={2}
        choices={CHOICES}
        defaultValue={destination?.route ?? "disposed"}
        error={errorOf("route")}
      />
      <TextField
        {...register("name")}
        label="Receiver"
        maxLength={80}
        autoComplete="off"
        error={errorOf("name")}
      />
      <TextField
        {...register("receiverNumber")}
        label="Its registration or permit number"
        maxLength={60}
        autoComplete="off"
        error={errorOf("receiverNumber")}
      />
      <div className="grid gap-4 wide:grid-cols-2">
        <TextField
          {...register("carrierName")}
          label="Carrier"
          maxLength={80}
          autoComplete="off"
          error={errorOf("carrierName")}
        />
        <TextField
          {...register("carrierNumber")}
          label="Carrier's registration"
          maxLength={60}
          autoComplete="off"
          error={errorOf("carrierNumber")}
        />
        <TextField
          {...register("permitUntil", { setValueAs: (text: string | null) => text || null })}
          type="date"
          label="Permits good until"
          error={errorOf("permitUntil")}
        />
        <TextField
          {...register("wasteCode")}
          label="List of Waste code"
          hint="Such as 20 01 39, with * where hazardous."
          mono
          maxLength={12}
          autoComplete="off"
          error={errorOf("wasteCode")}
        />
      </div>
      <LocalRules />
    </FormDialog>
  );
}
