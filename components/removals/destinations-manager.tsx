"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { formatDay, type Day } from "@/lib/core/time";
import {
  restoreDestinationEndpoint,
  retireDestinationEndpoint,
  type Destination,
} from "@/lib/removals/contract/destinations";
import { permitState } from "@/lib/removals/rules";
import { ROUTE_NAMES } from "@/lib/removals/terms";
import { RowActions } from "@/components/ui/row-actions";
import { DestinationDialog } from "./destination-dialog";

type Props = { destinations: readonly Destination[]; today: Day };

/** Who takes what leaves the shed, with the numbers that stand on the papers. */
export function DestinationsManager({ destinations, today }: Props) {
  const router = useRouter();
  const [editing, setEditing] = useState<Destination | "new" | null>(null);
  const retire = useCommand(retireDestinationEndpoint);
  const restore = useCommand(restoreDestinationEndpoint);
  const setRetired = async ({ id }: Destination, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ destinationId: id });
    if (result.kind === "done") router.refresh();
  };
  const addButton = <Button onClick={() => setEditing("new")}>Add a destination</Button>;
  return (
    <div className="grid gap-4">
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Destinations"
        rows={destinations}
        rowKey={({ id }) => id}
        empty={
          <EmptyState title="No destination yet" action={addButton}>
            Enter who takes the rejects, and who takes stock that is passed on. Nothing can be
            recorded as taken away before that.
          </EmptyState>
        }
        columns={[
          {
            key: "name",
            header: "Receiver",
            head: true,
            cell: ({ name }) => <span className="wrap-anywhere">{name}</span>,
          },
          { key: "route", header: "Route", cell: ({ route }) => ROUTE_NAMES[route] },
          { key: "number", header: "Its number", cell: (one) => said(one.receiverNumber) },
          {
            key: "carrier",
            header: "Carrier",
            cell: (one) =>
              said([one.carrierName, one.carrierNumber].filter((part) => part !== "").join(", ")),
          },
          {
            key: "code",
            header: "List of Waste",
            cell: ({ wasteCode }) => (
              <span className="font-mono whitespace-nowrap">{said(wasteCode)}</span>
            ),
          },
          {
            key: "permit",
            header: "Permit until",
            cell: (one) => permitCell(one.permitUntil, today),
          },
          {
            key: "actions",
            header: <span className="sr-only">Actions</span>,
            cell: (one) => (
              <RowActions
                name={one.name}
                retired={one.retiredAt !== null}
                busy={retire.pending || restore.pending}
                onChange={() => setEditing(one)}
                onRetire={(retired) => void setRetired(one, retired)}
              />
            ),
          },
        ]}
      />
      {destinations.length > 0 ? <div>{addButton}</div> : null}
      {editing === null ? null : (
        <DestinationDialog
          destination={editing === "new" ? null : editing}
          onClose={() => setEditing(null)}
          onSaved={() => {
            setEditing(null);
            router.refresh();
          }}
        />
      )}
    </div>
  );
}

const said = (text: string): string => (text === "" ? "–" : text);

function permitCell(until: Day | null, today: Day) {
  if (until === null) return "–";
  const state = permitState(until, today);
  if (state === "good") return formatDay(until);
  return (
    <strong className={state === "over" ? "text-bad" : "text-warn"}>
      {formatDay(until)}, {state === "over" ? "run out" : "ends soon"}
    </strong>
  );
}
