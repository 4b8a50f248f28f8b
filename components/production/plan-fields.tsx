import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { Catalogue, Piece } from "@/lib/production/contract/catalogue";
import { METHOD_NAMES, type Heatable } from "@/lib/production/terms";
import { makersOf, readPieces, withPiece, type PlanForm } from "./plan-form";

type Props = {
  form: PlanForm;
  catalogue: Catalogue;
  piece: Piece;
  onChange: (form: PlanForm) => void;
  errorOf: (field: string) => string | undefined;
};

/** What is made, of what, with what, how many. */
export function PlanFields({ form, catalogue, piece, onChange, errorOf }: Props) {
  const { tools, machines } = makersOf(catalogue, piece);
  const set = (part: Partial<PlanForm>) => onChange({ ...form, ...part });
  return (
    <div className="grid gap-4">
      <SelectField
        label="Piece"
        value={form.pieceId}
        onChange={(event) => onChange(withPiece(form, catalogue, event.target.value))}
        options={catalogue.pieces
          .filter(({ id, retiredAt }) => retiredAt === null || id === form.pieceId)
          .map(({ id, name, method }) => ({
            value: id,
            label: `${name}, ${METHOD_NAMES[method].toLowerCase()}`,
          }))}
        error={errorOf("pieceId")}
      />
      <ChoiceTiles
        legend="Plastic"
        name="polymer"
        columns={3}
        choices={piece.polymers.map((value) => ({ value, label: POLYMER_NAMES[value].name }))}
        value={form.polymer}
        onChoose={(polymer) => set({ polymer: polymer as Heatable })}
        error={errorOf("polymer")}
      />
      <TextField
        label={piece.method === "pressing" ? "Sheets" : "Pieces"}
        mono
        inputMode="numeric"
        autoComplete="off"
        value={form.pieces}
        onChange={(event) => set({ pieces: event.target.value })}
        error={
          errorOf("wantedPieces") ??
          (form.pieces !== "" && readPieces(form.pieces) === null
            ? "A whole number from 1 to 100 000."
            : undefined)
        }
      />
      {piece.method === "moulding" ? (
        <SelectField
          label="Tool"
          value={form.toolId}
          onChange={(event) => set({ toolId: event.target.value })}
          placeholder="Choose a tool"
          options={tools.map(({ id, name, cavities }) => ({
            value: id,
            label: `${name}, ${cavities === 1 ? "1 cavity" : `${cavities} cavities`}`,
          }))}
          error={errorOf("toolId")}
        />
      ) : null}
      <SelectField
        label="Machine"
        value={form.machineId}
        onChange={(event) => set({ machineId: event.target.value })}
        placeholder="Choose a machine"
        options={machines.map(({ id, name }) => ({ value: id, label: name }))}
        error={errorOf("machineId")}
      />
    </div>
  );
}
