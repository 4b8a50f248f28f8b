"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import {
  addMachineEndpoint,
  changeMachineEndpoint,
  machineDataSchema,
  type Machine,
  type MachineData,
} from "@/lib/production/contract/catalogue";
import { METHOD_NAMES, METHODS } from "@/lib/production/terms";
import { fieldError } from "./catalogue-field-error";
import { askedMachine, typedMachine, type MachineTyped } from "./catalogue-machine-typed";
import { CatalogueSetPoints } from "./catalogue-set-points";
import { exactTime } from "./catalogue-words";

const METHOD_CHOICES = METHODS.map((value) => ({ value, label: METHOD_NAMES[value] }));
const FIELDS = Object.keys(machineDataSchema.shape);
const ASKED = z.custom<MachineTyped>().transform(askedMachine).pipe(machineDataSchema);

type Figure = Exclude<keyof MachineTyped, "name" | "method" | "setPoints">;
type Props = {
  /** null: a new one. */
  machine: Machine | null;
  onClose: () => void;
  onSaved: () => void;
};

/** Adds a machine or changes one: only what its method asks for. */
export function CatalogueMachineDialog({ machine, onClose, onSaved }: Props) {
  const add = useCommand(addMachineEndpoint);
  const change = useCommand(changeMachineEndpoint);
  const command = machine ? change : add;
  const { register, control, handleSubmit, formState } = useForm<
    MachineTyped,
    unknown,
    MachineData
  >({
    resolver: zodResolver(ASKED),
    defaultValues: typedMachine(machine),
  });
  const [method, melt, cycle] = useWatch({
    control,
    name: ["method", "meltSeconds", "cycleSeconds"],
  });
  const save = handleSubmit(async (values) => {
    const result = machine
      ? await change.send({ ...values, machineId: machine.id })
      : await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const { errors } = formState;
  const figure = (name: Figure, label: string, unit: string, hint?: string) => (
    <TextField
      key={name}
      {...register(name)}
      label={label}
      unit={unit}
      hint={hint}
      mono
      inputMode="decimal"
      autoComplete="off"
      error={fieldError(errors[name], command.fieldErrors[name])}
    />
  );
  return (
    <FormDialog
      title={
        <span className="wrap-anywhere">
          {machine ? `Change ${machine.name}` : "Add a machine"}
        </span>
      }
      submit={machine ? "Save changes" : "Add the machine"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={FIELDS}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As helpers call it, such as Sheet press."
        maxLength={60}
        autoComplete="off"
        error={fieldError(errors.name, command.fieldErrors.name)}
      />
      <ChoiceTiles
        {...register("method")}
        legend="Does"
        columns={3}
        choices={METHOD_CHOICES}
        defaultValue={machine?.method ?? "pressing"}
        error={fieldError(errors.method, command.fieldErrors.method)}
      />
      <div className="grid grid-cols-2 items-start gap-4">
        {method === "pressing" ? (
          <>
            {figure("plateLengthUm", "Length of the plate", "mm")}
            {figure("plateWidthUm", "Width of the plate", "mm")}
          </>
        ) : null}
        {method === "moulding" ? (
          <>
            {figure("barrelMm3", "Barrel", "cm³")}
            {figure("usableThousandths", "Of it usable", "%")}
            {figure("leastShotMilligrams", "Smallest shot", "g", "Empty: any.")}
            {figure("purgeMilligrams", "Purge at a change", "g", "Of colour or polymer.")}
          </>
        ) : null}
        {method === "cutting"
          ? null
          : figure(
              "meltSeconds",
              method === "pressing" ? "Heating a load" : "Melting a fill",
              "s",
              timeHint(melt, "450 is 7 min 30 s."),
            )}
        {figure("cycleSeconds", CYCLE_LABELS[method], "s", timeHint(cycle, "90 is 1 min 30 s."))}
        {figure("ratedWatts", "Rated power", "W", "On its plate.")}
      </div>
      {method === "cutting" ? null : (
        <CatalogueSetPoints
          register={register}
          errorOf={(at) =>
            fieldError(
              errors.setPoints?.[at]?.celsius,
              command.fieldErrors[`setPoints.${at}.celsius`],
            )
          }
        />
      )}
    </FormDialog>
  );
}

const CYCLE_LABELS = {
  pressing: "Cooling and changing",
  moulding: "One shot",
  cutting: "One sheet",
} as const;

/** Seconds as they are said; an example while nothing is typed. */
function timeHint(typed: string, example: string): string {
  return /^\s*\d{1,5}\s*$/.test(typed) ? `= ${exactTime(Number(typed))}` : example;
}
