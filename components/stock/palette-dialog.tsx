"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import type * as z from "zod";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import {
  addColourEndpoint,
  addColourSchema,
  changeColourEndpoint,
  hexSchema,
  type Colour,
} from "@/lib/stock/contract/palette";
import { COLOUR_LOOKS, type ColourLook } from "@/lib/stock/terms";
import { PaletteSwatch } from "./palette-swatch";

const schema = addColourSchema.omit({ requestId: true });
type Typed = z.input<typeof schema>;

const LOOK_NAMES: Record<ColourLook, string> = {
  solid: "One colour",
  clear: "See-through",
  mixed: "Many colours",
};
const LOOKS = COLOUR_LOOKS.map((value) => ({ value, label: LOOK_NAMES[value] }));

type PaletteDialogProps = {
  /** null: a new one. */
  colour: Colour | null;
  onClose: () => void;
  onSaved: () => void;
};

/** Adds a colour or changes one. */
export function PaletteDialog({ colour, onClose, onSaved }: PaletteDialogProps) {
  const add = useCommand(addColourEndpoint);
  const change = useCommand(changeColourEndpoint);
  const command = colour ? change : add;
  const { register, control, handleSubmit, setValue, formState } = useForm<
    Typed,
    unknown,
    z.output<typeof schema>
  >({
    resolver: zodResolver(schema),
    defaultValues: colour
      ? { name: colour.name, hex: colour.hex, look: colour.look }
      : { hex: "#2f8f83", look: "solid" },
  });
  const [hex, look] = useWatch({ control, name: ["hex", "look"] });
  const shown = hexSchema.safeParse(hex).data ?? "#80867a";
  const save = handleSubmit(async (values) => {
    const result = colour
      ? await change.send({ ...values, code: colour.code })
      : await add.send(values);
    if (result.kind === "done") onSaved();
  });
  const errorOf = (field: keyof Typed) => {
    const issue = formState.errors[field]?.message;
    if (!issue) return command.fieldErrors[field];
    return fieldSentence(/^[a-z][a-z-]*$/.test(issue) ? issue : "empty");
  };
  return (
    <FormDialog
      title={colour ? `Change ${colour.name}` : "Add a colour"}
      submit={colour ? "Save changes" : "Add the colour"}
      onSubmit={save}
      onClose={onClose}
      command={command}
      shownFields={["name", "hex", "look"]}
    >
      <TextField
        {...register("name")}
        label="Name"
        hint={colour ? "Stock of this colour takes the new name too." : undefined}
        error={errorOf("name")}
        maxLength={40}
        autoComplete="off"
      />
      <div className="flex items-end gap-3">
        <TextField
          {...register("hex")}
          label="Value"
          hint="As it looks on a screen."
          mono
          maxLength={7}
          autoComplete="off"
          spellCheck={false}
          error={errorOf("hex")}
          className="grow"
        />
        <label className="relative mb-0.5 block size-13 shrink-0 overflow-hidden rounded-control border border-edge has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-act wide:size-11.5">
          <PaletteSwatch hex={shown} look={look} size={56} />
          <span className="sr-only">Choose the value from the system&apos;s colours</span>
          <input
            type="color"
            value={shown}
            onChange={(event) =>
              setValue("hex", event.target.value, { shouldDirty: true, shouldValidate: true })
            }
            className="absolute inset-0 size-full cursor-pointer opacity-0"
          />
        </label>
      </div>
      <ChoiceTiles
        {...register("look")}
        legend="Looks like"
        choices={LOOKS}
        columns={3}
        defaultValue={colour?.look ?? "solid"}
        error={errorOf("look")}
      />
    </FormDialog>
  );
}
