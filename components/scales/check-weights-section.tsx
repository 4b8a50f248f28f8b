"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { formatMilligrams } from "@/lib/core/mass";
import {
  restoreCheckWeightEndpoint,
  retireCheckWeightEndpoint,
  type CheckWeight,
} from "@/lib/scales/contract/checks";
import { CheckWeightDialog } from "./check-weight-dialog";
import { ListSection } from "@/components/ui/list-section";
import { RowActions } from "@/components/ui/row-actions";

/** Objects of known mass with which the scales are checked. */
export function CheckWeightsSection({ weights }: { weights: readonly CheckWeight[] }) {
  const router = useRouter();
  const [adding, setAdding] = useState(false);
  const retire = useCommand(retireCheckWeightEndpoint);
  const restore = useCommand(restoreCheckWeightEndpoint);
  const setRetired = async (weight: CheckWeight, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ checkWeightId: weight.id });
    if (result.kind === "done") router.refresh();
  };
  const addButton = (
    <Button size="small" variant="quiet" onClick={() => setAdding(true)}>
      Add a check weight
    </Button>
  );
  return (
    <ListSection title="Check weights" action={weights.length > 0 ? addButton : null}>
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Check weights"
        rows={weights}
        rowKey={({ id }) => id}
        empty={
          <EmptyState title="No check weight yet" as="h3" action={addButton}>
            Any object will do whose mass is known: weigh it once on a verified scale, and keep it
            dry and clean.
          </EmptyState>
        }
        columns={[
          { key: "name", header: "Name", head: true, cell: ({ name }) => name },
          {
            key: "mass",
            header: "Mass, kg",
            align: "figure",
            cell: ({ massMilligrams }) => formatMilligrams(massMilligrams),
          },
          {
            key: "evidence",
            header: "Known from",
            cell: ({ evidence }) => <span className="wrap-anywhere">{evidence}</span>,
          },
          {
            key: "actions",
            header: <span className="sr-only">Actions</span>,
            cell: (weight) => (
              <RowActions
                name={weight.name}
                retired={weight.retiredAt !== null}
                busy={retire.pending || restore.pending}
                onRetire={(retired) => void setRetired(weight, retired)}
              />
            ),
          },
        ]}
      />
      {adding ? (
        <CheckWeightDialog
          onClose={() => setAdding(false)}
          onSaved={() => {
            setAdding(false);
            router.refresh();
          }}
        />
      ) : null}
    </ListSection>
  );
}
