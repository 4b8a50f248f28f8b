"use client";

import { useState } from "react";
import { fieldErrorsOf } from "@/components/forms/problem-document";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { TextField } from "@/components/ui/text-field";
import type { giveSpareTagEndpoint } from "@/lib/bags/contract";
import { readScan } from "@/lib/core/bag-code";
import { SPARE_TAG } from "./addresses";
import { CODE_SENTENCES } from "./read-form";
import type { DeskPoint } from "./use-desk-lists";

type Props = {
  points: readonly DeskPoint[];
  onClose(): void;
  /** The bag has a code now; `drawn` when it must be written on the bag. */
  onTag(code: string, drawn: boolean): void;
};

/** A bag that came without a tag gets a spare one: a printed one from the box, or a code to write on it. */
export function SpareTagDialog({ points, onClose, onTag }: Props) {
  const builtIn = points.filter((point) => point.builtIn);
  const [pointId, setPointId] = useState("");
  const [typed, setTyped] = useState("");
  const [wrong, setWrong] = useState<string | null>(null);
  const command = useCommand<typeof giveSpareTagEndpoint>(SPARE_TAG);
  const chosen = pointId || (builtIn.find(({ kind }) => kind === "not-known")?.id ?? "");

  const give = async () => {
    const code = typed.trim() === "" ? undefined : readScan(typed);
    if (code === null) {
      setWrong(CODE_SENTENCES.wrong);
      return;
    }
    setWrong(null);
    const result = await command.send({
      pointId: chosen || undefined,
      code,
    });
    if (result.kind === "done") {
      setTyped("");
      onTag(result.receipt.code, code === undefined);
    } else {
      setWrong(
        result.kind === "refused"
          ? (fieldErrorsOf(result.problem).code ?? result.problem.detail)
          : UNANSWERED_SENTENCE,
      );
    }
  };

  return (
    <Dialog
      open
      onClose={onClose}
      title="A bag without a tag"
      actions={
        <Button onClick={() => void give()} busy={command.pending}>
          {typed.trim() === "" ? "Draw a code for this bag" : "Use this tag"}
        </Button>
      }
    >
      <div className="grid gap-4">
        <ChoiceTiles
          legend="Where is it from?"
          name="spare-point"
          columns={2}
          choices={builtIn.map(({ id, name }) => ({ value: id, label: name }))}
          value={chosen}
          onChoose={setPointId}
        />
        <TextField
          label="Code of a spare tag from the box"
          hint="Leave it empty to draw a new code and write it on the bag."
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
          mono
          autoComplete="off"
          spellCheck={false}
        />
        {wrong ? (
          <Notice
            tone="bad"
            title={wrong === UNANSWERED_SENTENCE ? "No answer" : "Not done"}
            live="alert"
          >
            {wrong}
          </Notice>
        ) : null}
      </div>
    </Dialog>
  );
}
