"use client";

import { useEffect, useRef, useState } from "react";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import { replaceTagEndpoint } from "@/lib/bags/contract";
import { formatCode, readScan } from "@/lib/core/bag-code";

/** A bag's new code; `drawn` when it is to be written on the bag. */
export type NewTag = { code: string; drawn: boolean };

type Props = {
  /** A code that the bag has. */
  code: string;
  onDone: (tag: NewTag) => void;
  onClose: () => void;
};

const WAYS = [
  { value: "box", label: "Spare tag from the box" },
  { value: "drawn", label: "No tag at hand" },
];
const NO_CODE =
  "That is no code of a tag here. One letter or figure is wrong; compare it with the tag.";

/** Gives a bag whose tag is lost or cannot be read another one. */
export function ReplaceTagDialog({ code, onDone, onClose }: Props) {
  const replace = useCommand(replaceTagEndpoint);
  const [way, setWay] = useState("box");
  const [typed, setTyped] = useState("");
  const [asked, setAsked] = useState(false);
  const field = useRef<HTMLInputElement>(null);
  // A hand scanner types into the field that has the focus.
  useEffect(() => field.current?.focus(), [way]);

  const drawn = way === "drawn";
  const newCode = readScan(typed);
  const own = typed.trim() === "" ? "Scan the spare tag, or type its code." : NO_CODE;

  async function send() {
    setAsked(true);
    if (!drawn && newCode === null) {
      field.current?.focus();
      return;
    }
    const result = await replace.send({ code, newCode: drawn ? undefined : (newCode ?? "") });
    if (result.kind === "done") onDone({ code: result.receipt.newCode, drawn });
  }

  return (
    <FormDialog
      title="Replace a lost tag"
      submit={
        drawn
          ? "Draw a code for this bag"
          : newCode === null
            ? "Put this tag on the bag"
            : `Put ${formatCode(newCode)} on this bag`
      }
      onSubmit={send}
      onClose={onClose}
      command={replace}
      shownFields={drawn ? [] : ["newCode"]}
    >
      <ChoiceTiles
        legend="What goes on the bag?"
        name="way"
        columns={2}
        value={way}
        onChoose={(next) => {
          setWay(next);
          setAsked(false);
          replace.reset();
        }}
        choices={WAYS}
      />
      {drawn ? null : (
        <TextField
          ref={field}
          label="Code of the spare tag"
          value={typed}
          mono
          autoComplete="off"
          autoCapitalize="characters"
          spellCheck={false}
          onChange={(event) => {
            setTyped(event.target.value);
            setAsked(false);
            replace.reset();
          }}
          onKeyDown={(event) => {
            if (event.key !== "Enter") return;
            // A hand scanner ends with Enter: what it read is looked at before it is put on the bag.
            event.preventDefault();
            if (newCode !== null) setTyped(formatCode(newCode));
            setAsked(true);
          }}
          error={replace.fieldErrors.newCode ?? (asked && newCode === null ? own : undefined)}
        />
      )}
      <p>
        {drawn
          ? "The program draws a new code. Write it on the bag with a marker."
          : "The spare tag belongs to this bag from then on, and to no other."}{" "}
        The old code{" "}
        <span className="font-mono tracking-tighter whitespace-nowrap">{formatCode(code)}</span>{" "}
        stays good: should the tag turn up, both open this bag.
      </p>
    </FormDialog>
  );
}
