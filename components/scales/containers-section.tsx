"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { formatCode } from "@/lib/core/bag-code";
import { formatMilligrams } from "@/lib/core/mass";
import {
  restoreContainerEndpoint,
  retireContainerEndpoint,
  type ContainerReceipt,
} from "@/lib/scales/contract/containers";
import type { ScaleReceipt } from "@/lib/scales/contract/scales";
import type { Tare } from "@/lib/scales/queries/tares";
import { TARE_KIND_NAMES } from "@/lib/scales/terms";
import { ContainerDialog } from "./container-dialog";
import { ListSection } from "@/components/ui/list-section";
import { RowActions } from "@/components/ui/row-actions";
import { TareDialog } from "./tare-dialog";

type Props = {
  containers: readonly ContainerReceipt[];
  /** What each weighed when, newest first. */
  tares: ReadonlyMap<string, readonly Tare[]>;
  scales: readonly ScaleReceipt[];
  timeZone: string;
};

/** Containers and sacks whose empty weight is taken off at the scale. */
export function ContainersSection({ containers, tares, scales, timeZone }: Props) {
  const router = useRouter();
  const [editing, setEditing] = useState<ContainerReceipt | "new" | null>(null);
  const [weighing, setWeighing] = useState<ContainerReceipt | null>(null);
  const retire = useCommand(retireContainerEndpoint);
  const restore = useCommand(restoreContainerEndpoint);
  const setRetired = async (container: ContainerReceipt, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ containerId: container.id });
    if (result.kind === "done") router.refresh();
  };
  const columns: readonly Column<ContainerReceipt>[] = [
    { key: "name", header: "Name", head: true, cell: (one) => one.name },
    { key: "kind", header: "Kind", cell: (one) => TARE_KIND_NAMES[one.kind] },
    {
      key: "tare",
      header: "Empty, kg",
      align: "figure",
      cell: (one) => formatMilligrams(one.tareMilligrams),
    },
    {
      key: "code",
      header: "Label",
      cell: (one) =>
        one.labelCode === null ? (
          <span className="text-soft">None</span>
        ) : (
          <span className="font-mono">{formatCode(one.labelCode)}</span>
        ),
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
        >
          <Button
            variant="link"
            size="small"
            aria-label={`Weigh ${one.name} again`}
            onClick={() => setWeighing(one)}
          >
            Weigh again
          </Button>
        </RowActions>
      ),
    },
  ];
  const addButton = (
    <Button size="small" variant="quiet" onClick={() => setEditing("new")}>
      Add one
    </Button>
  );
  const labelled = containers.some((one) => one.labelCode !== null && one.retiredAt === null);
  return (
    <ListSection
      title="Containers and sacks"
      action={
        containers.length > 0 ? (
          <>
            {labelled ? (
              <ButtonLink href="/scales/labels" variant="link" size="small">
                Print labels
              </ButtonLink>
            ) : null}
            {addButton}
          </>
        ) : null
      }
    >
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Containers and sacks"
        columns={columns}
        rows={containers}
        rowKey={(one) => one.id}
        empty={
          <EmptyState title="No container yet" as="h3" action={addButton}>
            Weigh each crate and each kind of sack once, empty; at weigh-in its weight is taken off.
          </EmptyState>
        }
      />
      {weighing ? (
        <TareDialog
          container={weighing}
          tares={tares.get(weighing.id) ?? []}
          scales={scales.filter(({ retiredAt }) => retiredAt === null)}
          timeZone={timeZone}
          onClose={() => setWeighing(null)}
          onSaved={() => {
            setWeighing(null);
            router.refresh();
          }}
        />
      ) : null}
      {editing === null ? null : (
        <ContainerDialog
          container={editing === "new" ? null : editing}
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
