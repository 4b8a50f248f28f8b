"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { formatMeasure } from "@/lib/core/measure";
import {
  addToolEndpoint,
  changeToolEndpoint,
  toolDataSchema,
  type Piece,
  type Tool,
  type ToolData,
} from "@/lib/production/contract/catalogue";
import { fieldError } from "./catalogue-field-error";

type Typed = z.input<typeof toolDataSchema>;
const FIELDS = Object.keys(toolDataSchema.shape);

type Props = {
  /** null: a new one. */
  tool: Tool | null;
  /** What it can make. */
  pieces: readonly Piece[];
  onClose: () => void;
  onSaved: () => void;
};

/** Adds a mould or changes one. */
export function CatalogueToolDialog({ tool, pieces, onClose, onSaved }: Props) {
  const add = useCommand(addToolEndpoint);
  const change = useCommand(changeToolEndpoint);
  const command = tool ? change : add;
  const { register, handleSubmit, formState } = useForm<Typed, unknown, ToolData>({
    resolver: zodResolver(toolDataSchema),
    defaultValues: typedTool(tool, pieces),
  });
  const save = handleSubmit(async (values) => {
    const result = tool
      ? await change.send({ ...values, toolId: tool.id })
      : await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) =>
    fieldError(formState.errors[field], command.fieldErrors[field]);
  const figure = (name: keyof Typed, label: string, unit?: string, hint?: string) => (
    <TextField
      {...register(name)}
      label={label}
      unit={unit}
      hint={hint}
      mono
      inputMode="decimal"
      autoComplete="off"
      error={errorOf(name)}
    />
  );
  return (
    <FormDialog
      title={<span className="wrap-anywhere">{tool ? `Change ${tool.name}` : "Add a tool"}</span>}
      submit={tool ? "Save changes" : "Add the tool"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={FIELDS}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As it is written on the tool, such as Coaster mould, two cavities."
        maxLength={60}
        autoComplete="off"
        error={errorOf("name")}
      />
      <SelectField
        {...register("pieceId")}
        label="Makes"
        placeholder="Choose the piece"
        options={pieces.map(({ id, name }) => ({ value: id, label: name }))}
        error={formState.errors.pieceId ? "Choose the piece that it makes." : errorOf("pieceId")}
      />
      <div className="grid grid-cols-2 items-start gap-4">
        {figure("cavities", "Cavities")}
        {figure("gates", "Gates")}
        {figure("runnerMilligrams", "Sprue and runners", "g")}
        {figure("preheatMinutes", "Preheat", "min")}
        {figure("startUpShots", "Shots to start up")}
        {figure("goodThousandths", "Good pieces", "%")}
      </div>
      <p className="-mt-2 text-sm text-soft">
        Shots to start up and the good share are a guess until the tool has runs of its own.
      </p>
      <div className="grid items-start gap-4 wide:grid-cols-2">
        {figure(
          "shotsBefore",
          "Shots made before",
          undefined,
          "Before its first run in this book.",
        )}
        {figure("serviceAtShots", "Service due at", "shots", "Empty: not counted.")}
        {figure("costCents", "Cost", undefined, "In the money of the prices.")}
      </div>
    </FormDialog>
  );
}

function typedTool(tool: Tool | null, pieces: readonly Piece[]): Typed {
  if (!tool) {
    return {
      name: "",
      pieceId: pieces.length === 1 ? (pieces[0]?.id ?? "") : "",
      cavities: "1",
      gates: "1",
      runnerMilligrams: "",
      costCents: "",
      preheatMinutes: "0",
      shotsBefore: "0",
      serviceAtShots: "",
      startUpShots: "3",
      goodThousandths: "95",
    };
  }
  return {
    name: tool.name,
    pieceId: tool.pieceId,
    cavities: String(tool.cavities),
    gates: String(tool.gates),
    runnerMilligrams: formatMeasure(tool.runnerMilligrams, "mass"),
    costCents: formatMeasure(tool.costCents, "money"),
    preheatMinutes: String(tool.preheatMinutes),
    shotsBefore: String(tool.shotsBefore),
    serviceAtShots: tool.serviceAtShots === null ? "" : String(tool.serviceAtShots),
    startUpShots: String(tool.startUpShots),
    goodThousandths: formatMeasure(tool.goodThousandths, "share"),
  };
}
