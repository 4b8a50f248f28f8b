"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { formatStep } from "@/lib/core/mass";
import {
  restoreScaleEndpoint,
  retireScaleEndpoint,
  type ScaleReceipt,
} from "@/lib/scales/contract/scales";
import { SCALE_CLASS_NAMES } from "@/lib/scales/terms";
import { ListSection } from "@/components/ui/list-section";
import { RowActions } from "@/components/ui/row-actions";
import { ScaleDialog } from "./scale-dialog";

/** The scheme's scales: what stands on their plates. */
export function ScalesSection({ scales }: { scales: readonly ScaleReceipt[] }) {
  const router = useRouter();
  const [editing, setEditing] = useState<ScaleReceipt | "new" | null>(null);
  const retire = useCommand(retireScaleEndpoint);
  const restore = useCommand(restoreScaleEndpoint);
  const setRetired = async (scale: ScaleReceipt, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ scaleId: scale.id });
    if (result.kind === "done") router.refresh();
  };
  const columns: readonly Column<ScaleReceipt>[] = [
    { key: "name", header: "Name", head: true, cell: (scale) => scale.name },
    { key: "class", header: "Class", cell: (scale) => SCALE_CLASS_NAMES[scale.class] },
    {
      key: "max",
      header: "Max",
      align: "figure",
      cell: (scale) => formatStep(scale.maxMilligrams),
    },
    {
      key: "e",
      header: "e, or ±",
      align: "figure",
      cell: (scale) =>
        scale.eMilligrams === null
          ? `± ${formatStep(scale.statedAccuracyMilligrams ?? 0)}`
          : formatStep(scale.eMilligrams),
    },
    { key: "d", header: "Step d", align: "figure", cell: (scale) => formatStep(scale.dMilligrams) },
    {
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (scale) => (
        <RowActions
          name={scale.name}
          retired={scale.retiredAt !== null}
          busy={retire.pending || restore.pending}
          onChange={() => setEditing(scale)}
          onRetire={(retired) => void setRetired(scale, retired)}
        />
      ),
    },
  ];
  const addButton = (
    <Button size="small" variant="quiet" onClick={() => setEditing("new")}>
      Add a scale
    </Button>
  );
  return (
    <ListSection title="Scales" action={scales.length > 0 ? addButton : null}>
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Scales"
        columns={columns}
        rows={scales}
        rowKey={(scale) => scale.id}
        empty={
          <EmptyState title="No scale yet" as="h3" action={addButton}>
            Nothing can be weighed in before the first one is here. Take what stands on its plate.
          </EmptyState>
        }
      />
      {editing === null ? null : (
        <ScaleDialog
          scale={editing === "new" ? null : editing}
          onClose={() => setEditing(null)}
          onSaved={() => {
            setEditing(null);
            router.refresh();
          }}
        />
      )}
    </ListSection>
  );
}
