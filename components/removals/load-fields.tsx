"use client";

import { WeightField } from "@/components/forms/weight-field";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { formatKg } from "@/lib/core/mass";
import type { NamedScale } from "@/lib/scales/rules/reading";
import { emptyReading, type ReadingValue } from "../weighing/form-values";
import { readingRefusal, type ListedTare } from "../weighing/read-form";
import { TareField } from "../weighing/tare-field";
import { MOST_READINGS } from "@/lib/removals/terms";
import { gramsOf, type DraftProblems, type LoadDraft, type RemovalDraft } from "./removal-draft";

type Props = {
  how: RemovalDraft["how"];
  load: LoadDraft;
  /** Place in the form: "loads.0". */
  name: string;
  /** "the reject bin", "lot 118" */
  where: string;
  bookGrams: number;
  scale: NamedScale | undefined;
  tares: readonly ListedTare[];
  problems: DraftProblems;
  onLoad: (load: LoadDraft) => void;
};

/** What was taken from one place: readings of the scale, the carrier's word, or all that the book has. */
export function LoadFields({
  how,
  load,
  name,
  where,
  bookGrams,
  scale,
  tares,
  problems,
  onLoad,
}: Props) {
  const setReading = (at: number, change: Partial<ReadingValue>) =>
    onLoad({
      ...load,
      readings: load.readings.map((value, index) =>
        index === at ? { ...value, ...change } : value,
      ),
    });
  const grams = gramsOf({ how }, load, bookGrams, tares);
  if (how === "book") {
    return (
      <p>
        All of it: <span className="font-mono font-bold">{formatKg(bookGrams)}</span> kg by the
        book. Its weight counts as estimated.
      </p>
    );
  }
  return (
    <div className="grid gap-3">
      {how === "stated" ? (
        <WeightField
          label="The carrier says"
          name={`${name}.grams`}
          text={load.statedKg}
          onText={(statedKg) => onLoad({ ...load, statedKg })}
          error={problems[`${name}.grams`]}
        />
      ) : (
        load.readings.map((value, at) => (
          <fieldset key={at} className="grid gap-3">
            <legend className={load.readings.length > 1 ? "mb-1 text-sm font-bold" : "sr-only"}>
              Reading {at + 1}
            </legend>
            <WeightField
              label="The scale shows"
              name={`${name}.readings.${at}.gross`}
              text={value.gross}
              onText={(gross) => setReading(at, { gross })}
              error={
                problems[`${name}.readings.${at}.gross`] ??
                readingRefusal(value, tares, scale) ??
                undefined
              }
            />
            <div className="grid grid-cols-2 gap-3">
              {(["container", "sack"] as const).map((part) => (
                <TareField
                  key={part}
                  label={part === "container" ? "Container" : "Sack"}
                  name={`${name}.readings.${at}.${part}`}
                  value={value[part]}
                  listed={tares.filter(({ kind }) => kind === part)}
                  onChange={(tare) => setReading(at, { [part]: tare })}
                  error={problems[`${name}.readings.${at}.${part}.text`]}
                />
              ))}
            </div>
          </fieldset>
        ))
      )}
      {how === "weighed" ? (
        <div className="flex flex-wrap gap-x-2">
          <Button
            variant="link"
            size="small"
            disabled={load.readings.length >= MOST_READINGS}
            onClick={() =>
              onLoad({
                ...load,
                readings: [...load.readings, emptyReading(load.readings.at(-1))],
              })
            }
          >
            Add a reading
          </Button>
          {load.readings.length > 1 ? (
            <Button
              variant="link"
              size="small"
              onClick={() => onLoad({ ...load, readings: load.readings.slice(0, -1) })}
            >
              Remove the last
            </Button>
          ) : null}
        </div>
      ) : null}
      <CheckField
        label="Nothing is left there"
        hint={wholeHint(where, grams, bookGrams, load.whole)}
        checked={load.whole}
        onChange={(event) => onLoad({ ...load, whole: event.target.checked })}
      />
    </div>
  );
}

function wholeHint(where: string, grams: number | null, bookGrams: number, whole: boolean): string {
  const book = `The book has ${formatKg(bookGrams)} kg in ${where}.`;
  if (grams === null || grams === bookGrams) return book;
  const off = formatKg(Math.abs(bookGrams - grams));
  if (grams > bookGrams) return `${book} ${off} kg more goes down as difference.`;
  return whole
    ? `${book} The missing ${off} kg goes down as difference.`
    : `${book} ${off} kg stays there.`;
}
