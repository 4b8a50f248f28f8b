"use client";

import { useCallback, type ReactNode } from "react";
import { CheckField } from "@/components/ui/check-field";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Button } from "@/components/ui/button";
import { Late } from "@/components/ui/late";
import { KIND_NAMES, KINDS, type Kind, type PolymerAnswer } from "@/lib/core/plastics";
import { CONDITION_NAMES, CONDITIONS, type Condition } from "@/lib/weighing/terms";
import type { Lab } from "@/lib/core/colour";
import { ColourTiles } from "./colour-tiles";
import { ResinTiles } from "./resin-tiles";
import type { DeskColour } from "./use-desk-lists";
import type { WeighInForm } from "./use-weigh-in";

const loadColourHelp = async () => (await import("../uploads/colour-help")).ColourHelp;

const CONDITION_CHOICES = CONDITIONS.map((value) => ({ value, label: CONDITION_NAMES[value] }));
/** Own regrind never comes in a bag. */
const KIND_CHOICES = KINDS.filter((kind) => kind !== "regrind").map((value) => ({
  value,
  label: KIND_NAMES[value],
}));

type Props = {
  weighIn: Pick<WeighInForm, "form" | "sameAsLast">;
  colours: readonly DeskColour[];
  /** Where photos are taken: above the colours, which they help to choose. */
  photos: ReactNode;
  /** Colour of the photo just taken. */
  middle: Lab | null;
};

/** What is in the bag, as far as it is known: all of it optional until the bag is said to be one kind. */
export function AnswerFields({ weighIn, colours, photos, middle }: Props) {
  const { form, sameAsLast } = weighIn;
  const { values, problems, set, forgive } = form;
  const choosePolymer = useCallback(
    (polymer: PolymerAnswer) =>
      // A mixed bag is not one kind.
      set(polymer === "mixed" ? { polymer, oneKind: false } : { polymer }),
    [set],
  );
  const chooseColour = useCallback((colourCode: string) => set({ colourCode }), [set]);
  const isClear = colours.find(({ code }) => code === values.colourCode)?.look === "clear";
  const blackWithCode = values.colourCode === "black" && isNamed(values.polymer);
  return (
    <div className="mt-4 grid gap-4">
      {sameAsLast ? (
        <Button variant="quiet" size="small" onClick={sameAsLast} className="justify-self-start">
          Same as last
        </Button>
      ) : null}
      <ResinTiles value={values.polymer} onChoose={choosePolymer} error={problems.polymer} />
      {photos}
      <div>
        <Late
          load={loadColourHelp}
          given={
            middle && !isClear
              ? { lab: middle, palette: colours, value: values.colourCode, onChoose: chooseColour }
              : null
          }
        />
        <ColourTiles
          colours={colours}
          value={values.colourCode}
          onChoose={chooseColour}
          hint={
            blackWithCode
              ? "Only if each piece has its code moulded in. Black without a code is Not sure."
              : undefined
          }
          error={problems.colourCode}
        />
      </div>
      <ChoiceTiles
        legend="Condition"
        name="condition"
        columns={3}
        choices={CONDITION_CHOICES}
        value={values.condition}
        onChoose={(condition) => set({ condition: condition as Condition })}
      />
      <CheckField
        label="The whole bag is one kind"
        name="oneKind"
        hint={
          values.polymer === "mixed"
            ? "For a bag of one plastic, kind and colour: choose its resin code first."
            : "It goes straight into its lot and is not sorted again."
        }
        checked={values.oneKind}
        disabled={values.polymer === "mixed"}
        onChange={(event) => {
          set({ oneKind: event.target.checked });
          forgive("polymer", "kind", "colourCode");
        }}
      />
      {values.oneKind ? (
        <ChoiceTiles
          legend="Kind"
          name="kind"
          columns={4}
          choices={KIND_CHOICES}
          value={values.kind}
          onChoose={(kind) => set({ kind: kind as Kind })}
          error={problems.kind}
        />
      ) : null}
    </div>
  );
}

const isNamed = (polymer: PolymerAnswer): boolean => polymer !== "mixed" && polymer !== "not-sure";
