"use client";

import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { SelectField } from "@/components/ui/select-field";
import {
  KIND_NAMES,
  KINDS,
  POLYMER_NAMES,
  POLYMERS,
  type Kind,
  type Polymer,
} from "@/lib/core/plastics";
import type { identifyLotEndpoint, MoveReceipt } from "@/lib/stock/contract/moves";
import { IDENTIFY_METHOD_NAMES, IDENTIFY_METHODS, type IdentifyMethod } from "@/lib/stock/terms";
import { ColourTiles } from "../weighing/colour-tiles";
import { IDENTIFY } from "./addresses";
import { AmountFields, sentAmount, type AmountValue } from "./amount-fields";
import { errorsUnder } from "./field-errors";
import { LeftFields, sentFound, type FoundValue } from "./left-fields";
import type { LotFacts } from "./lot-facts";
import { RefusalNotice } from "./refusal-notice";
import { ReservedQuestion } from "./reserved-question";
import { useBinDesk } from "./use-bin-desk";
import { firstWeighing } from "./weighing-value";

type Props = {
  lot: Pick<LotFacts, "number" | "kind" | "colourCode" | "heldGrams">;
  onSaved: (receipt: MoveReceipt) => void;
  onClose: () => void;
};

const POLYMER_TILES = POLYMERS.map((polymer) => ({
  value: polymer,
  big: String(POLYMER_NAMES[polymer].resinCode),
  label: POLYMER_NAMES[polymer].name,
}));

/** What "Not sure" turned out to be. */
export function IdentifyDialog({ lot, onSaved, onClose }: Props) {
  const { lists, scaleId } = useBinDesk();
  const identify = useCommand<typeof identifyLotEndpoint>(IDENTIFY);
  const [polymer, setPolymer] = useState<Polymer | "">("");
  const [kind, setKind] = useState<Kind>(lot.kind);
  const [colourCode, setColour] = useState(lot.colourCode);
  const [method, setMethod] = useState<IdentifyMethod | "">("");
  const [typed, setTyped] = useState<AmountValue>({
    how: lot.heldGrams > 0 ? "all" : "taken",
    emptied: false,
    weighing: firstWeighing(""),
  });
  const [leftTyped, setLeft] = useState<FoundValue>({ found: "", weighing: firstWeighing("") });
  const [asked, setAsked] = useState(false);
  const [reservedToo, setReservedToo] = useState(false);
  const withScale = <V extends { weighing: AmountValue["weighing"] }>(value: V): V => ({
    ...value,
    weighing: { ...value.weighing, scaleId: value.weighing.scaleId || scaleId },
  });
  const [amount, left] = [withScale(typed), withScale(leftTyped)];

  async function send(knowingly = reservedToo) {
    setAsked(true);
    const sent = sentAmount(amount, lists);
    if (polymer === "" || method === "" || !sent) return;
    const result = await identify.send(
      {
        number: lot.number,
        occurredAt: Date.now(),
        polymer,
        kind,
        colourCode,
        method,
        amount: sent,
        count: left.found === "" ? null : sentFound(left, lists),
        reservedToo: knowingly,
      },
      { pressedAt: "occurredAt" },
    );
    if (result.kind === "done") onSaved(result.receipt);
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={`What is lot ${lot.number}?`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button busy={identify.pending} onClick={() => void send()}>
            {polymer === "" ? "Save" : `It is ${POLYMER_NAMES[polymer].name}`}
          </Button>
        </>
      }
    >
      <div className="grid gap-5">
        <p>
          Never burn a piece to find out: the fumes are poisonous. If you are not sure, leave it
          here.
        </p>
        <ChoiceTiles
          legend="It is"
          name="identity"
          choices={POLYMER_TILES}
          value={polymer}
          onChoose={(value) => setPolymer(value as Polymer)}
          error={asked && polymer === "" ? "Choose what it is." : undefined}
        />
        <ChoiceTiles
          legend="How was it found out?"
          name="method"
          columns={2}
          choices={IDENTIFY_METHODS.map((value) => ({
            value,
            label: IDENTIFY_METHOD_NAMES[value],
          }))}
          value={method}
          onChoose={(value) => setMethod(value as IdentifyMethod)}
          error={asked && method === "" ? "Choose how it was found out." : undefined}
        />
        <SelectField
          label="Kind"
          value={kind}
          onChange={(event) => setKind(event.target.value as Kind)}
          options={KINDS.map((value) => ({ value, label: KIND_NAMES[value] }))}
        />
        <ColourTiles
          colours={lists.colours}
          value={colourCode}
          onChoose={setColour}
          hint={undefined}
          error={identify.fieldErrors.colourCode}
        />
        <AmountFields
          value={amount}
          onValue={setTyped}
          heldGrams={lot.heldGrams}
          lists={lists}
          asked={asked}
          errors={errorsUnder(identify.fieldErrors, "amount")}
          legend="How much of the lot?"
        />
        {identify.problem?.code === "lot-holds-less" ? (
          <LeftFields
            value={left}
            onValue={setLeft}
            lists={lists}
            asked={asked}
            errors={errorsUnder(identify.fieldErrors, "count")}
            said={identify.problem.detail}
          />
        ) : null}
        <ReservedQuestion
          command={identify}
          onTake={() => {
            setReservedToo(true);
            void send(true);
          }}
        />
        <RefusalNotice command={identify} except={["lot-holds-less", "lot-reserved"]} />
      </div>
    </Dialog>
  );
}
