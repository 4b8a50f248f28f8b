"use client";

import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { ScaleToday } from "../scales/scale-today";
import type { ReadingValue, TareValue } from "./form-values";
import { TareField } from "./tare-field";
import type { DeskLists } from "./use-desk-lists";

type Props = {
  /** Place of the reading in its ticket. */
  at: number;
  reading: ReadingValue;
  lists: DeskLists;
  scaleId: string;
  /** A field's refusal, by its name in the form. */
  message(name: string): string | undefined;
  onTare(part: "container" | "sack", value: TareValue): void;
  onScale(id: string): void;
  /** null: the ticket has as many readings as it may have. */
  onAddReading: (() => void) | null;
  /** null: there is nothing to clear. */
  onStartOver: (() => void) | null;
};

/** What stands under and on the scale: container, sack, and which scale it is. */
export function InstrumentFields({
  at,
  reading,
  lists,
  scaleId,
  message,
  onTare,
  onScale,
  onAddReading,
  onStartOver,
}: Props) {
  return (
    <>
      <div className="mt-3 grid grid-cols-2 gap-2.5">
        {(["container", "sack"] as const).map((part) => (
          <TareField
            key={part}
            label={part === "container" ? "Container" : "Sack"}
            name={`readings.${at}.${part}`}
            value={reading[part]}
            listed={lists.containers.filter(({ kind }) => kind === part)}
            onChange={(value) => onTare(part, value)}
            error={message(`readings.${at}.${part}.text`)}
          />
        ))}
      </div>
      <div className="mt-2 flex items-center gap-x-1">
        <SelectField
          label="Scale"
          hideLabel
          name="scaleId"
          className="min-w-0 grow"
          value={scaleId}
          onChange={(event) => onScale(event.target.value)}
          placeholder="Choose the scale"
          options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
          error={message("scaleId")}
        />
        <Button
          variant="link"
          size="small"
          className="shrink-0 whitespace-nowrap"
          onClick={onAddReading ?? undefined}
          disabled={onAddReading === null || reading.gross.trim() === ""}
        >
          Add a reading
        </Button>
        {onStartOver ? (
          <Button variant="link" size="small" className="shrink-0" onClick={onStartOver}>
            Clear
          </Button>
        ) : null}
      </div>
      <ScaleToday scaleId={scaleId} onScale={onScale} />
    </>
  );
}
