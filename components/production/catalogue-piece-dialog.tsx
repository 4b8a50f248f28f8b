"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import { KIND_NAMES, KINDS } from "@/lib/core/plastics";
import {
  addPieceEndpoint,
  changePieceEndpoint,
  pieceDataSchema,
  type Density,
  type Piece,
  type PieceData,
} from "@/lib/production/contract/catalogue";
import { HEATABLE, METHOD_NAMES, METHODS } from "@/lib/production/terms";
import { CatalogueCheckGroup } from "./catalogue-check-group";
import { fieldError } from "./catalogue-field-error";
import { askedPiece, typedPiece, type PieceTyped } from "./catalogue-piece-typed";
import { CataloguePieceWorking } from "./catalogue-piece-working";
import { gramsOf, polymerName } from "./catalogue-words";

const METHOD_CHOICES = METHODS.map((value) => ({ value, label: METHOD_NAMES[value] }));
const POLYMER_CHOICES = HEATABLE.map((value) => ({ value, label: polymerName(value) }));
const KIND_CHOICES = KINDS.map((value) => ({ value, label: KIND_NAMES[value] }));
const BY_CHOICES = [
  { value: "mass", label: "Its mass" },
  { value: "volume", label: "Its volume" },
];
const FIELDS = Object.keys(pieceDataSchema.shape);
const ASKED = z.custom<PieceTyped>().transform(askedPiece).pipe(pieceDataSchema);

type Measured = Exclude<keyof PieceTyped, "method" | "by" | "polymers" | "kinds" | "name">;
type Props = {
  /** null: a new one. */
  piece: Piece | null;
  densities: readonly Density[];
  onClose: () => void;
  onSaved: () => void;
};

/** Adds a piece or changes one: only what its method asks for. */
export function CataloguePieceDialog({ piece, densities, onClose, onSaved }: Props) {
  const add = useCommand(addPieceEndpoint);
  const change = useCommand(changePieceEndpoint);
  const command = piece ? change : add;
  const { register, control, handleSubmit, formState } = useForm<PieceTyped, unknown, PieceData>({
    resolver: zodResolver(ASKED),
    defaultValues: typedPiece(piece),
  });
  const [method, by] = useWatch({ control, name: ["method", "by"] });
  const save = handleSubmit(async (values) => {
    const result = piece
      ? await change.send({ ...values, pieceId: piece.id })
      : await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof PieceTyped) =>
    fieldError(formState.errors[field], command.fieldErrors[field]);
  const measured = (name: Measured, label: string, unit?: string, hint?: string) => (
    <TextField
      key={name}
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
      title={
        <span className="wrap-anywhere">{piece ? `Change ${piece.name}` : "Add a piece"}</span>
      }
      submit={piece ? "Save changes" : "Add the piece"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={FIELDS}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint="As buyers and helpers call one of them, such as Coaster."
        maxLength={60}
        autoComplete="off"
        error={errorOf("name")}
      />
      <ChoiceTiles
        {...register("method")}
        legend="Made by"
        columns={3}
        choices={METHOD_CHOICES}
        defaultValue={piece?.method ?? "moulding"}
        error={errorOf("method")}
      />
      {method === "moulding" ? null : (
        <fieldset className="min-w-0">
          <legend className="mb-1.5 font-bold">
            {method === "pressing" ? "The sheet" : "The sheet that it is cut from"}
          </legend>
          <div className="grid grid-cols-2 items-start gap-4">
            {measured("lengthUm", "Length", "mm")}
            {measured("widthUm", "Width", "mm")}
            {measured("thicknessUm", "Thickness", "mm")}
            {method === "pressing" ? measured("trimThousandths", "Trim on top", "%") : null}
            {method === "cutting" ? measured("piecesPerSheet", "Pieces per sheet") : null}
          </div>
        </fieldset>
      )}
      {method === "pressing" ? null : (
        <>
          <ChoiceTiles
            {...register("by")}
            legend="Known of one piece"
            hint="Once good pieces were weighed, their mean counts instead."
            columns={2}
            choices={BY_CHOICES}
            defaultValue={!piece || piece.volumeMm3 === null ? "mass" : "volume"}
          />
          {by === "mass"
            ? measured("massMilligrams", "Mass of one piece", "g")
            : measured("volumeMm3", "Volume of one piece", "cm³")}
        </>
      )}
      <CatalogueCheckGroup
        legend="Polymers that it may be made of"
        choices={POLYMER_CHOICES}
        field={register("polymers")}
        error={errorOf("polymers")}
      />
      <CataloguePieceWorking control={control} densities={densities} />
      {!piece || piece.weighedMilligrams === null ? null : (
        <p className="text-sm text-soft">
          {piece.weighedPieces} weighed together: {gramsOf(piece.weighedMilligrams)} g each. That
          counts until method, size or mass change here.
        </p>
      )}
      <CatalogueCheckGroup
        legend="Kinds that may go in"
        choices={KIND_CHOICES}
        field={register("kinds")}
        error={errorOf("kinds")}
      />
      <div className="grid items-start gap-4 wide:grid-cols-2">
        {measured("priceCents", "Price of one", undefined, "Such as 4.50, or empty.")}
        {measured(
          "otherCostCents",
          "Other cost of one",
          undefined,
          "Such as power, screws, packing.",
        )}
      </div>
      {measured(
        "mostHeatedThousandths",
        "Largest share of plastic heated before",
        "%",
        "A plan above it warns. Empty: any share will do.",
      )}
    </FormDialog>
  );
}
