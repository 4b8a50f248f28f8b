"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { SelectField } from "@/components/ui/select-field";
import { SwatchPaint } from "@/components/ui/swatch-paint";
import { formatKg } from "@/lib/core/mass";
import {
  FORM_NAMES,
  FORMS,
  KIND_NAMES,
  KINDS,
  POLYMER_NAMES,
  WASH_NAMES,
  WASH_STATES,
  type Form,
  type Kind,
  type WashState,
} from "@/lib/core/plastics";
import { PATTERNS } from "../stock/patterns";
import { ColourFromPhoto } from "../uploads/colour-from-photo";
import type { ListedTare } from "../weighing/read-form";
import type { DeskColour, DeskScale } from "../weighing/use-desk-lists";
import { netOf, type PileDraft, type PilePolymer } from "./draft";
import { LotField } from "./lot-field";
import { WeighingFields } from "./weighing-fields";

type Props = {
  /** A new pile, or one that is looked at again. */
  pile: PileDraft;
  isNew: boolean;
  scale: DeskScale | undefined;
  tares: readonly ListedTare[];
  colours: readonly DeskColour[];
  onSave: (pile: PileDraft) => void;
  onRemove: () => void;
  onClose: () => void;
};

const TILES: readonly PilePolymer[] = ["PET", "PE-HD", "PVC", "PE-LD", "PP", "PS"];
/** Those that share the number 7. */
const SEVENS: readonly PilePolymer[] = ["O", "ABS", "PLA", "PA", "PC"];

/** One pile: what it is and what it weighs. */
export function PileDialog({
  pile: first,
  isNew,
  scale,
  tares,
  colours,
  onSave,
  onRemove,
  onClose,
}: Props) {
  const [pile, setPile] = useState(first);
  /** A lot is one of a material: with another material it is chosen anew. */
  const say = (fields: Partial<PileDraft>) => setPile({ ...pile, lot: null, ...fields });
  const [asked, setAsked] = useState(false);
  const net = netOf(pile.reading, tares);
  const isSeven = SEVENS.some((seven) => seven === pile.polymer);
  const complete =
    pile.polymer !== "" && pile.colourCode !== "" && pile.kind !== "" && net !== null && net > 0;

  function save() {
    if (complete) onSave(pile);
    else setAsked(true);
  }

  const missing = (empty: boolean, words: string) => (asked && empty ? words : undefined);
  return (
    <Dialog
      open
      onClose={onClose}
      title={isNew ? "Add pile" : "Change pile"}
      actions={
        <>
          {isNew ? null : (
            <Button variant="danger" onClick={onRemove}>
              Remove pile
            </Button>
          )}
          <Button onClick={save}>
            {net !== null && net > 0 ? `Put ${formatKg(net)} kg down` : "Put it down"}
          </Button>
        </>
      }
    >
      <div className="grid gap-5">
        <ChoiceTiles
          legend="Number on it"
          name="polymer"
          value={isSeven ? "O" : pile.polymer}
          onChoose={(value) => say({ polymer: value as PilePolymer })}
          error={missing(pile.polymer === "", "Choose the number, or Not sure.")}
          choices={[
            ...TILES.map((polymer) => ({
              value: polymer,
              label: POLYMER_NAMES[polymer].name,
              big: POLYMER_NAMES[polymer].resinCode,
            })),
            { value: "O", label: "Other", big: 7 },
            { value: "not-sure", label: "Not sure", big: "?" },
          ]}
        />
        {isSeven ? (
          <SelectField
            label="Letters beside the 7"
            value={pile.polymer}
            onChange={(event) => say({ polymer: event.target.value as PilePolymer })}
            options={SEVENS.map((polymer) => ({
              value: polymer,
              label: polymer === "O" ? "None, or others" : POLYMER_NAMES[polymer].name,
            }))}
          />
        ) : null}
        {pile.polymer === "PVC" || pile.polymer === "not-sure" ? (
          <p className="text-sm text-warn">
            <strong>Never heated.</strong> It gets its own lot and no run can take it.
          </p>
        ) : null}
        <ColourFromPhoto
          palette={colours}
          value={pile.colourCode}
          onChoose={(colourCode) => say({ colourCode })}
        />
        <ChoiceTiles
          legend="Colour"
          name="colour"
          value={pile.colourCode}
          onChoose={(colourCode) => say({ colourCode })}
          error={missing(pile.colourCode === "", "Choose the colour.")}
          choices={colours.map((colour) => ({
            value: colour.code,
            label: colour.name,
            swatch: (
              <SwatchPaint
                hex={colour.hex}
                pattern={PATTERNS[colour.look]}
                width={80}
                height={32}
              />
            ),
          }))}
        />
        <div className="grid grid-cols-2 gap-3 wide:grid-cols-3">
          <SelectField
            label="Kind"
            placeholder="Choose"
            value={pile.kind}
            onChange={(event) => say({ kind: event.target.value as Kind | "" })}
            error={missing(pile.kind === "", "Choose the kind.")}
            options={KINDS.map((kind) => ({ value: kind, label: KIND_NAMES[kind] }))}
          />
          <SelectField
            label="Form"
            value={pile.form}
            onChange={(event) => say({ form: event.target.value as Form })}
            options={FORMS.map((form) => ({ value: form, label: FORM_NAMES[form] }))}
          />
          <SelectField
            label="Washed?"
            className="max-wide:col-span-2"
            value={pile.wash}
            onChange={(event) => say({ wash: event.target.value as WashState })}
            options={WASH_STATES.map((wash) => ({ value: wash, label: WASH_NAMES[wash] }))}
          />
        </div>
        <LotField pile={pile} onLot={(lot) => setPile({ ...pile, lot })} />
        <WeighingFields
          value={pile.reading}
          onValue={(reading) => setPile({ ...pile, reading })}
          scale={scale}
          tares={tares}
          asked={asked}
        />
      </div>
    </Dialog>
  );
}
