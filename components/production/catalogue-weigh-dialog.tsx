"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { TextField } from "@/components/ui/text-field";
import {
  weighPiecesEndpoint,
  weighedPiecesSchema,
  type Piece,
} from "@/lib/production/contract/catalogue";
import { fieldError } from "./catalogue-field-error";
import { gramsOf } from "./catalogue-words";

type Typed = z.input<typeof weighedPiecesSchema>;
type Props = {
  piece: Piece;
  /** Milligrams of one as plans use it now, and how that is known. */
  now: { milligrams: number; known: string };
  onClose: () => void;
  onSaved: () => void;
};

/** Good pieces weighed together; their mean replaces the computed mass. */
export function CatalogueWeighDialog({ piece, now, onClose, onSaved }: Props) {
  const weigh = useCommand(weighPiecesEndpoint);
  const { register, control, handleSubmit, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof weighedPiecesSchema>
  >({
    resolver: zodResolver(weighedPiecesSchema),
    defaultValues: { count: "10", milligrams: "" },
  });
  const typed = useWatch({ control });
  const read = weighedPiecesSchema.safeParse(typed);
  const mean = read.success ? Math.round(read.data.milligrams / read.data.count) : null;
  const save = handleSubmit(async (values) => {
    const result = await weigh.send({ ...values, pieceId: piece.id });
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) =>
    fieldError(formState.errors[field], weigh.fieldErrors[field]);
  return (
    <FormDialog
      title={<span className="wrap-anywhere">Weigh {piece.name}</span>}
      submit={mean === null ? "Save the mean" : `Save ${gramsOf(mean)} g each`}
      onSubmit={save}
      onClose={onClose}
      command={weigh}
      shownFields={["count", "milligrams"]}
    >
      <p className="text-soft">
        Good ones, trimmed as they are sold, all on the scale at once. Ten or more make a fair mean.
      </p>
      <div className="grid grid-cols-2 items-start gap-4">
        <TextField
          {...register("count")}
          label="How many"
          mono
          inputMode="numeric"
          autoComplete="off"
          error={errorOf("count")}
        />
        <TextField
          {...register("milligrams")}
          label="Together"
          unit="g"
          mono
          inputMode="decimal"
          autoComplete="off"
          error={errorOf("milligrams")}
        />
      </div>
      <dl className="grid grid-cols-2 gap-4 rounded-control bg-well px-4 py-3" aria-live="polite">
        <div>
          <dt className="text-sm font-bold text-soft">Mean of one</dt>
          <dd className="font-mono text-2xl font-bold">
            {mean === null ? "–" : `${gramsOf(mean)} g`}
          </dd>
        </div>
        <div>
          <dt className="text-sm font-bold text-soft">Now, {now.known}</dt>
          <dd className="font-mono text-2xl">{gramsOf(now.milligrams)} g</dd>
          {mean === null || now.milligrams === 0 ? null : (
            <dd className="text-sm text-soft">{change(mean, now.milligrams)}</dd>
          )}
        </div>
      </dl>
    </FormDialog>
  );
}

/** "4.2 % heavier now" */
function change(mean: number, before: number): string {
  const thousandths = Math.round((Math.abs(mean - before) * 1000) / before);
  if (thousandths === 0) return "The same.";
  return `The mean is ${thousandths / 10} % ${mean > before ? "heavier" : "lighter"}.`;
}
