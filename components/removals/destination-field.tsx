"use client";

import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { formatDay, type Day } from "@/lib/core/time";
import type { Destination } from "@/lib/removals/contract/destinations";
import { permitState } from "@/lib/removals/rules";
import { ROUTE_NAMES } from "@/lib/removals/terms";

type Props = {
  destinations: readonly Destination[];
  value: string;
  today: Day;
  error: string | undefined;
  onChange: (id: string) => void;
};

/** Where it went, with the numbers that stand on the papers. */
export function DestinationField({ destinations, value, today, error, onChange }: Props) {
  const chosen = destinations.find(({ id }) => id === value);
  const permit = chosen ? permitState(chosen.permitUntil, today) : "none";
  return (
    <div className="grid gap-2">
      <SelectField
        label="Where it went"
        name="destinationId"
        placeholder="Choose"
        value={value}
        onChange={(event) => onChange(event.target.value)}
        options={destinations.map(({ id, name, route }) => ({
          value: id,
          label: `${name}, ${ROUTE_NAMES[route].toLowerCase()}`,
        }))}
        error={error}
      />
      {chosen ? (
        <p className="text-sm text-soft">
          {[
            chosen.receiverNumber && `Receiver's number ${chosen.receiverNumber}`,
            chosen.carrierName && `carried by ${chosen.carrierName}`,
            chosen.carrierNumber && `carrier's number ${chosen.carrierNumber}`,
          ]
            .filter(Boolean)
            .join(", ") || "No registration numbers are kept for it."}
        </p>
      ) : null}
      {chosen?.permitUntil && (permit === "over" || permit === "ends-soon") ? (
        <Notice tone="warn" title={permit === "over" ? "Permit run out" : "Permit ends soon"}>
          {permit === "over" ? "It was good" : "It is good"} until {formatDay(chosen.permitUntil)}.
          Ask for the new one; a coordinator enters it.
        </Notice>
      ) : null}
    </div>
  );
}
