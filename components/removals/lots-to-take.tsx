"use client";

import { useState } from "react";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { ProblemError, UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/text-field";
import { lotToTakeEndpoint, type LotToTake } from "@/lib/removals/contract/removals";
import { MOST_LOTS } from "@/lib/removals/terms";

type Props = {
  chosen: readonly number[];
  onLot: (lot: LotToTake) => void;
  error: string | undefined;
};

/** Adds a lot by its number. */
export function LotsToTake({ chosen, onLot, error }: Props) {
  const [text, setText] = useState("");
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  async function add() {
    const number = Number(text.trim().replace(/^lot\s*/i, ""));
    if (!Number.isSafeInteger(number) || number < 1) {
      setProblem("Type the lot's number, such as 118.");
      return;
    }
    if (chosen.includes(number)) {
      setProblem(`Lot ${number} is in the list already.`);
      return;
    }
    setBusy(true);
    try {
      onLot(await fetchEndpoint(lotToTakeEndpoint, { number }));
      setText("");
      setProblem(null);
    } catch (failure) {
      setProblem(
        failure instanceof ProblemError
          ? `There is no lot ${number}. Look at its label.`
          : UNREACHABLE_SENTENCE,
      );
    } finally {
      setBusy(false);
    }
  }
  return (
    <div className="flex items-end gap-2.5">
      <TextField
        label="Lot number"
        inputMode="numeric"
        className="min-w-0 grow"
        value={text}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => {
          if (event.key !== "Enter") return;
          // Enter adds the lot; it must not send the whole form.
          event.preventDefault();
          void add();
        }}
        error={problem ?? error}
      />
      <Button
        variant="quiet"
        className="shrink-0"
        busy={busy}
        disabled={chosen.length >= MOST_LOTS}
        onClick={() => void add()}
      >
        Add lot
      </Button>
    </div>
  );
}
