"use client";

import { Button } from "@/components/ui/button";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg } from "@/lib/core/mass";
import { MOST_READINGS } from "@/lib/weighing/terms";
import { WeighingFields } from "../sorting/weighing-fields";
import { netSoFar, type ListedTare } from "./read-form";
import type { DeskScale } from "./use-desk-lists";
import type { TicketForm } from "./use-ticket-form";

type Props = {
  form: TicketForm;
  scale: DeskScale | undefined;
  tares: readonly ListedTare[];
  asked: boolean;
};

/** Every reading of a ticket, each open to be changed, and their sum. */
export function ReadingsFields({ form, scale, tares, asked }: Props) {
  const { readings } = form.values;
  const sum = netSoFar(readings, tares);
  return (
    <Ticket as="section" label="Readings">
      <div className="grid gap-4">
        {readings.map((value, at) => (
          <div key={at} className="grid gap-1 border-b border-rule pb-4 last:border-0 last:pb-0">
            {readings.length > 1 ? (
              <div className="flex items-center justify-between">
                <h3 className="font-body text-sm font-bold text-soft">Reading {at + 1}</h3>
                <Button
                  variant="link"
                  size="small"
                  aria-label={`Remove reading ${at + 1}`}
                  onClick={() => form.removeReading(at)}
                >
                  Remove
                </Button>
              </div>
            ) : null}
            <WeighingFields
              value={value}
              onValue={(next) => form.setReading(at, next)}
              scale={scale}
              tares={tares}
              asked={asked}
              prefix={`readings.${at}.`}
              error={form.problems[`readings.${at}.gross`]}
            />
          </div>
        ))}
        <div className="flex flex-wrap items-end justify-between gap-3">
          {readings.length > 1 ? (
            <div className="min-w-32 grow">
              <WeightDisplay
                label="All readings"
                value={sum === null ? "–" : formatKg(sum)}
                largest={44}
                live
              />
            </div>
          ) : null}
          <Button
            variant="link"
            size="small"
            disabled={readings.length >= MOST_READINGS}
            onClick={form.addReading}
          >
            Add a reading
          </Button>
        </div>
      </div>
    </Ticket>
  );
}
