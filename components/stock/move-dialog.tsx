"use client";

import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/text-field";
import { formatKg } from "@/lib/core/mass";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { mergeLotEndpoint, MoveReceipt, splitLotEndpoint } from "@/lib/stock/contract/moves";
import { AmountFields, sentAmount, type AmountValue } from "./amount-fields";
import { MERGE, SPLIT } from "./addresses";
import { BinWeighing } from "./bin-weighing";
import { errorsUnder } from "./field-errors";
import { LeftFields, sentFound, type FoundValue } from "./left-fields";
import type { LotFacts } from "./lot-facts";
import { LotPicker } from "./lot-picker";
import { RefusalNotice } from "./refusal-notice";
import { ReservedQuestion } from "./reserved-question";
import { useBinDesk } from "./use-bin-desk";
import { firstWeighing, sentWeighing } from "./weighing-value";

type Props = {
  lot: LotFacts;
  kind: "merge" | "split";
  onSaved: (receipt: MoveReceipt) => void;
  onClose: () => void;
};

/** Pouring a lot into another of the same material, or part of it into a container of its own. */
export function MoveDialog({ lot, kind, onSaved, onClose }: Props) {
  const { lists, scaleId } = useBinDesk();
  const merge = useCommand<typeof mergeLotEndpoint>(MERGE);
  const split = useCommand<typeof splitLotEndpoint>(SPLIT);
  const command = kind === "merge" ? merge : split;
  const [typed, setTyped] = useState<AmountValue>({
    how: kind === "merge" && lot.heldGrams > 0 ? "all" : "taken",
    emptied: false,
    weighing: firstWeighing(""),
  });
  const [leftTyped, setLeft] = useState<FoundValue>({ found: "", weighing: firstWeighing("") });
  const [to, setTo] = useState<LotSummary | null>(null);
  const [place, setPlace] = useState("");
  const [asked, setAsked] = useState(false);
  const [reservedToo, setReservedToo] = useState(false);
  const withScale = <V extends { weighing: AmountValue["weighing"] }>(value: V): V => ({
    ...value,
    weighing: { ...value.weighing, scaleId: value.weighing.scaleId || scaleId },
  });
  const [amount, left] = [withScale(typed), withScale(leftTyped)];
  const holdsLess = command.problem?.code === "lot-holds-less";

  async function send(knowingly = reservedToo) {
    setAsked(true);
    const count = left.found === "" ? null : sentFound(left, lists);
    const base = { number: lot.number, occurredAt: Date.now(), count, reservedToo: knowingly };
    if (kind === "merge") {
      const sent = sentAmount(amount, lists);
      if (!to || !sent) return;
      const result = await merge.send(
        { ...base, toNumber: to.number, amount: sent },
        { pressedAt: "occurredAt" },
      );
      if (result.kind === "done") onSaved(result.receipt);
    } else {
      const sent = sentWeighing(amount.weighing, lists.containers);
      if (!sent) return;
      const result = await split.send(
        { ...base, amount: sent, place },
        { pressedAt: "occurredAt" },
      );
      if (result.kind === "done") onSaved(result.receipt);
    }
  }

  const { polymer, colourCode, form, wash } = lot;
  return (
    <Dialog
      open
      onClose={onClose}
      title={kind === "merge" ? `Pour lot ${lot.number} into another` : `Split lot ${lot.number}`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button
            busy={command.pending}
            disabled={kind === "merge" && !to}
            onClick={() => void send()}
          >
            {kind === "split"
              ? "Put it into a new lot"
              : to
                ? `Pour into lot ${to.number}`
                : "Choose a lot first"}
          </Button>
        </>
      }
    >
      <div className="grid gap-5">
        {kind === "split" ? (
          <p>Part of it goes into a container of its own, as a new lot of the same material.</p>
        ) : to ? (
          <p className="flex flex-wrap items-center justify-between gap-2 font-bold">
            <span>
              Into lot {to.number}, which holds{" "}
              <span className="font-mono">{formatKg(to.heldGrams)}</span> kg
            </span>
            <Button variant="link" size="small" onClick={() => setTo(null)}>
              Another lot
            </Button>
          </p>
        ) : (
          <LotPicker
            like={{ polymer, kind: lot.kind, colourCode, form, wash }}
            without={[lot.number]}
            onPick={setTo}
            legend="Into which lot of the same material?"
          />
        )}
        {kind === "split" ? (
          <>
            <BinWeighing
              value={amount.weighing}
              onValue={(weighing) => setTyped({ ...typed, weighing })}
              lists={lists}
              asked={asked}
              errors={errorsUnder(command.fieldErrors, "amount")}
              label="Goes into the new lot"
            />
            <TextField
              label="Place of the new lot"
              placeholder="Rack B, shelf 2"
              maxLength={80}
              value={place}
              onChange={(event) => setPlace(event.target.value)}
            />
          </>
        ) : to ? (
          <AmountFields
            value={amount}
            onValue={setTyped}
            heldGrams={lot.heldGrams}
            lists={lists}
            asked={asked}
            errors={errorsUnder(command.fieldErrors, "amount")}
            legend="How much of it?"
          />
        ) : null}
        {holdsLess ? (
          <LeftFields
            value={left}
            onValue={setLeft}
            lists={lists}
            asked={asked}
            errors={errorsUnder(command.fieldErrors, "count")}
            said={command.problem?.detail ?? ""}
          />
        ) : null}
        <ReservedQuestion
          command={command}
          onTake={() => {
            setReservedToo(true);
            void send(true);
          }}
        />
        <RefusalNotice command={command} except={["lot-holds-less", "lot-reserved"]} />
      </div>
    </Dialog>
  );
}
