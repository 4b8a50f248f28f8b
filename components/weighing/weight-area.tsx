"use client";

import { WeightField } from "@/components/forms/weight-field";
import { formatKg, gramsFromMilligrams } from "@/lib/core/mass";
import { tareMilligrams } from "@/lib/scales/rules/reading";
import type { ReadingValue } from "./form-values";
import { readReading, type ListedTare } from "./read-form";

type Props = {
  readings: readonly ReadingValue[];
  listed: readonly ListedTare[];
  netGrams: number | null;
  onGross(text: string): void;
  onRemove(index: number): void;
  /** Sentence of a refusal, or of what the scale cannot have shown. */
  error: string | null | undefined;
};

/** The scale's figure, the largest thing on the screen; what is taken off it; and the net, live. */
export function WeightArea({ readings, listed, netGrams, onGross, onRemove, error }: Props) {
  const at = readings.length - 1;
  const current = readings[at];
  if (!current) return null;
  const read = readings.map((value) => readReading(value, listed));
  const tare = tareOf(current, listed);
  return (
    <div>
      {readings.length > 1 ? (
        <ol className="mb-3 grid gap-1 border-b border-rule pb-3">
          {readings.slice(0, -1).map((value, index) => {
            const one = read[index];
            const net = one?.ok
              ? formatKg(
                  gramsFromMilligrams(one.reading.grossMilligrams - tareMilligrams(one.reading)),
                )
              : "–";
            return (
              <li key={index} className="flex items-center justify-between gap-2 text-sm">
                <span className="text-soft">Reading {index + 1}</span>
                <span className="font-mono">
                  {value.gross} → {net} kg
                </span>
                <button
                  type="button"
                  onClick={() => onRemove(index)}
                  className="link min-h-11 px-2 font-bold"
                >
                  Remove<span className="sr-only"> reading {index + 1}</span>
                </button>
              </li>
            );
          })}
        </ol>
      ) : null}
      <div className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-2">
        <WeightField
          label={readings.length > 1 ? `On the scale, reading ${readings.length}` : "On the scale"}
          name={`readings.${at}.gross`}
          size="huge"
          text={current.gross}
          onText={onGross}
          error={error}
        />
        <dl className="text-right">
          <dt className="text-xs font-bold text-soft">Crate and sack</dt>
          <dd className="font-mono text-base font-bold tracking-tighter">
            {tare === 0 ? "0.000" : `− ${formatKg(tare)}`}
          </dd>
          <dt className="mt-1.5 text-xs font-bold text-soft">
            {readings.length > 1 ? "Net of all" : "Net"}
          </dt>
          <dd
            className={`font-mono text-xl font-bold tracking-tighter ${netGrams !== null && netGrams < 0 ? "text-bad" : "text-ok"}`}
          >
            <output aria-live="polite" aria-label="Net in kilograms">
              {netGrams === null ? "–" : formatKg(netGrams)}
            </output>
          </dd>
        </dl>
      </div>
    </div>
  );
}

/** Grams of the tares of a reading, also while its gross is not typed yet. */
function tareOf(value: ReadingValue, listed: readonly ListedTare[]): number {
  const read = readReading({ ...value, gross: "0" }, listed);
  return read.ok ? gramsFromMilligrams(tareMilligrams(read.reading)) : 0;
}
