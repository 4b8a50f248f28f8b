"use client";

import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { Ticket } from "@/components/ui/ticket";
import { KIND_NAMES, type Kind } from "@/lib/core/plastics";
import { BinWeighing } from "../stock/bin-weighing";
import type { DeskLists } from "../weighing/use-desk-lists";
import type { OutputDraft } from "./step-draft";

type Props = {
  output: OutputDraft;
  at: number;
  onOutput: (output: OutputDraft) => void;
  /** null where there is only one. */
  onRemove: (() => void) | null;
  scaleId: string;
  lists: DeskLists;
  asked: boolean;
  errors: Readonly<Record<string, string>>;
  /** Kinds and colours that went in. */
  kinds: readonly Kind[];
  colours: readonly { code: string; name: string }[];
};

/** One reading of what came out; kind and colour are asked for where more than one went in. */
export function StepOutputCard({
  output,
  at,
  onOutput,
  onRemove,
  scaleId,
  lists,
  asked,
  errors,
  kinds,
  colours,
}: Props) {
  const mixed = lists.colours.filter(({ code }) => code === "mixed");
  const choices = [
    ...colours,
    ...mixed.filter(({ code }) => !colours.some((colour) => colour.code === code)),
  ];
  return (
    <Ticket as="li" label={`Reading ${at + 1}`}>
      <div className="grid gap-4">
        <BinWeighing
          value={{ scaleId, readings: [output.reading] }}
          onValue={({ readings: [reading] }) =>
            reading ? onOutput({ ...output, reading }) : undefined
          }
          lists={lists}
          asked={asked}
          errors={errors}
          single
          hideScale
          label="Came out"
        />
        {kinds.length > 1 || colours.length > 1 ? (
          <div className="grid grid-cols-2 gap-3">
            {kinds.length > 1 ? (
              <SelectField
                label="Which kind?"
                placeholder="Choose"
                value={output.kind}
                onChange={(event) => onOutput({ ...output, kind: event.target.value as Kind | "" })}
                options={[...new Set<Kind>([...kinds, "other"])].map((kind) => ({
                  value: kind,
                  label: KIND_NAMES[kind],
                }))}
                error={
                  errors.kind ??
                  (asked && output.kind === "" ? "Say which kind came out." : undefined)
                }
              />
            ) : null}
            {colours.length > 1 ? (
              <SelectField
                label="Which colour?"
                placeholder="Choose"
                value={output.colourCode}
                onChange={(event) => onOutput({ ...output, colourCode: event.target.value })}
                options={choices.map(({ code, name }) => ({ value: code, label: name }))}
                error={
                  errors.colourCode ??
                  (asked && output.colourCode === "" ? "Say which colour came out." : undefined)
                }
              />
            ) : null}
          </div>
        ) : null}
        {onRemove ? (
          <p>
            <Button variant="link" size="small" onClick={onRemove}>
              Take this reading off
            </Button>
          </p>
        ) : null}
      </div>
    </Ticket>
  );
}
