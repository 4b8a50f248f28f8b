"use client";

import { useState } from "react";
import type { OutputOf } from "@/components/forms/fetch-endpoint";
import { useCommand } from "@/components/forms/use-command";
import { WeightField } from "@/components/forms/weight-field";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { formatKg, gramsFromMilligrams, readMass } from "@/lib/core/mass";
import {
  KIND_NAMES,
  KINDS,
  POLYMER_NAMES,
  POLYMERS,
  type Kind,
  type Polymer,
} from "@/lib/core/plastics";
import type { correctMoveEndpoint, MoveView } from "@/lib/stock/contract/moves";
import { MOVE_KIND_NAMES } from "@/lib/stock/terms";
import { useDeskLists } from "../weighing/use-desk-lists";
import { CORRECT_MOVE } from "./addresses";
import { ReasonField } from "./reason-field";
import { RefusalNotice } from "./refusal-notice";

type Props = {
  move: MoveView;
  onSaved: (receipt: OutputOf<typeof correctMoveEndpoint>) => void;
  onClose: () => void;
};

/** Puts a move right: another weight, another lot or identity, or that it never was. */
export function CorrectMoveDialog({ move, onSaved, onClose }: Props) {
  const lists = useDeskLists();
  const correct = useCommand<typeof correctMoveEndpoint>(CORRECT_MOVE);
  const [instead, setInstead] = useState<"else" | "nothing">("else");
  const [kg, setKg] = useState(formatKg(move.grams).replace("\u2009", ""));
  const [to, setTo] = useState(String(move.toNumber));
  const [polymer, setPolymer] = useState<Polymer | "">("");
  const [kind, setKind] = useState<Kind | "">("");
  const [colour, setColour] = useState("");
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const read = readMass(kg, "kg");
  const grams = read.ok ? gramsFromMilligrams(read.milligrams) : 0;
  const identity =
    move.kind === "identify" && polymer !== "" && kind !== "" && colour !== "" && move.method
      ? { polymer, kind, colourCode: colour, method: move.method }
      : null;

  async function send() {
    setAsked(true);
    if (reason.trim().length < 3 || (instead === "else" && grams < 1)) return;
    const result = await correct.send({
      id: move.moveId,
      reason,
      replacement:
        instead === "nothing"
          ? null
          : { grams, toNumber: move.kind === "merge" ? to : null, identity },
    });
    if (result.kind === "done") onSaved(result.receipt);
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Correct: ${MOVE_KIND_NAMES[move.kind].toLowerCase()} from lot ${move.fromNumber}`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button busy={correct.pending} onClick={() => void send()}>
            {instead === "nothing" ? "Take it back" : "Correct it"}
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <ChoiceTiles
          legend="What is right?"
          name="instead"
          columns={2}
          value={instead}
          onChoose={(value) => setInstead(value as "else" | "nothing")}
          choices={[
            { value: "else", label: "It was something else" },
            { value: "nothing", label: "It never was" },
          ]}
        />
        {instead === "else" ? (
          <>
            <WeightField
              label="Weight that went over"
              text={kg}
              onText={setKg}
              showProblem={asked}
              error={correct.fieldErrors["replacement.grams"]}
            />
            {move.kind === "merge" ? (
              <TextField
                label="Into lot"
                inputMode="numeric"
                mono
                value={to}
                onChange={(event) => setTo(event.target.value)}
                error={correct.fieldErrors.toNumber ?? correct.fieldErrors["replacement.toNumber"]}
              />
            ) : null}
            {move.kind === "identify" ? (
              <div className="grid gap-3 wide:grid-cols-3">
                <SelectField
                  label="It is"
                  placeholder="As it was said"
                  value={polymer}
                  onChange={(event) => setPolymer(event.target.value as Polymer | "")}
                  options={POLYMERS.map((value) => ({ value, label: POLYMER_NAMES[value].name }))}
                />
                <SelectField
                  label="Kind"
                  placeholder="Choose"
                  disabled={polymer === ""}
                  value={kind}
                  onChange={(event) => setKind(event.target.value as Kind | "")}
                  options={KINDS.map((value) => ({ value, label: KIND_NAMES[value] }))}
                  error={asked && polymer !== "" && kind === "" ? "Choose the kind." : undefined}
                />
                <SelectField
                  label="Colour"
                  placeholder="Choose"
                  disabled={polymer === ""}
                  value={colour}
                  onChange={(event) => setColour(event.target.value)}
                  options={lists.colours.map(({ code, name }) => ({ value: code, label: name }))}
                  error={
                    asked && polymer !== "" && colour === "" ? "Choose the colour." : undefined
                  }
                />
              </div>
            ) : null}
          </>
        ) : null}
        <ReasonField
          value={reason}
          onValue={setReason}
          error={correct.fieldErrors.reason}
          asked={asked}
        />
        <RefusalNotice command={correct} />
      </div>
    </Dialog>
  );
}
