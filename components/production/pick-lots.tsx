"use client";

import Link from "next/link";
import { useState } from "react";
import { WeightField } from "@/components/forms/weight-field";
import type { Command } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { formatKg, gramsFromMilligrams, readMass } from "@/lib/core/mass";
import { FORM_NAMES, KIND_NAMES } from "@/lib/core/plastics";
import type { reserveEndpoint } from "@/lib/production/contract/reservations";
import type { RunPage } from "@/lib/production/queries/runs";
import { stepsBefore } from "@/lib/production/rules/usable";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";

type Props = {
  page: RunPage;
  onReserve: (lots: { number: number; grams: number }[]) => Promise<boolean>;
  command: Command<typeof reserveEndpoint>;
};

/** Lots chosen by hand; what needs a step first offers that step. */
export function PickLots({ page, onReserve, command }: Props) {
  const [typed, setTyped] = useState<Readonly<Record<number, string>>>({});
  const usable = page.lots.filter(({ usable, freeGrams }) => usable && freeGrams > 0);
  const later = page.lots.filter((lot) => !lot.usable);
  const chosen = usable.flatMap(({ number }) => {
    const reading = readMass(typed[number] ?? "", "kg");
    const grams = reading.ok ? gramsFromMilligrams(reading.milligrams) : 0;
    return grams > 0 ? [{ number, grams }] : [];
  });
  const save = async () => {
    if (await onReserve(chosen)) setTyped({});
  };
  const errorOf = (number: number): string | undefined => {
    const at = chosen.findIndex((one) => one.number === number);
    return command.fieldErrors[`lots.${at}.grams`] ?? command.fieldErrors[`lots.${at}.number`];
  };
  return (
    <details className="mt-4 rounded-ticket border border-rule bg-card px-4">
      <summary className="flex min-h-12 cursor-pointer items-center font-bold">
        Choose lots by hand
      </summary>
      {usable.length === 0 ? (
        <p className="pb-3 text-soft">No lot of these colours has anything free.</p>
      ) : (
        <>
          <ul className="grid gap-3 pb-2">
            {usable.map((lot) => (
              <li
                key={lot.number}
                className="grid items-center gap-x-4 border-t border-rule pt-3 wide:grid-cols-[minmax(0,1fr)_12rem]"
              >
                <p className="min-w-0">
                  <strong>Lot {lot.number}</strong>, {colourOf(page, lot.colourCode)}{" "}
                  {KIND_NAMES[lot.kind].toLowerCase()}, {FORM_NAMES[lot.form].toLowerCase()}
                  <span className="block text-sm text-soft">
                    {formatKg(lot.freeGrams)} kg free{lot.place ? `, ${lot.place}` : ""}
                  </span>
                </p>
                <WeightField
                  label={`Reserve of lot ${lot.number}`}
                  hideLabel
                  optional
                  text={typed[lot.number] ?? ""}
                  onText={(text) => setTyped((all) => ({ ...all, [lot.number]: text }))}
                  error={errorOf(lot.number)}
                />
              </li>
            ))}
          </ul>
          <Button
            variant="quiet"
            disabled={chosen.length === 0}
            busy={command.pending}
            onClick={() => void save()}
            className="mb-4"
          >
            Reserve {formatKg(chosen.reduce((sum, { grams }) => sum + grams, 0))} kg of these
          </Button>
        </>
      )}
      {later.length > 0 ? (
        <ul className="grid gap-1 border-t border-rule py-3 text-sm">
          {later.map((lot) => {
            const steps = stepsBefore(page.piece.method, lot);
            return (
              <li key={lot.number}>
                Lot {lot.number}, {formatKg(lot.heldGrams)} kg, {FORM_NAMES[lot.form].toLowerCase()}
                :{" "}
                {steps === null ? (
                  "has to be pressed into a sheet first."
                ) : (
                  <Link
                    href={{ pathname: "/steps/new", query: { lot: lot.number } }}
                    className="link inline-flex min-h-11 items-center font-bold"
                  >
                    {steps.map((step) => STEP_KIND_NAMES[step]).join(", then ")} first
                  </Link>
                )}
              </li>
            );
          })}
        </ul>
      ) : null}
    </details>
  );
}

const colourOf = (page: RunPage, code: string): string =>
  (page.run.colours.find(({ colourCode }) => colourCode === code)?.name ?? code).toLowerCase();
