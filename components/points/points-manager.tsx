"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { closePointEndpoint, reopenPointEndpoint, type PointReceipt } from "@/lib/points/contract";
import { POINT_KIND_NAMES } from "@/lib/points/terms";
import { PointDialog } from "./point-dialog";

type Said = { text: string; undo: PointReceipt | null };

/** The scheme's drop-off points: add, change, close, open again. */
export function PointsManager({ points }: { points: readonly PointReceipt[] }) {
  const router = useRouter();
  const [editing, setEditing] = useState<PointReceipt | "new" | null>(null);
  const [said, setSaid] = useState<Said | null>(null);
  const close = useCommand(closePointEndpoint);
  const reopen = useCommand(reopenPointEndpoint);

  const setClosed = async (point: PointReceipt, closed: boolean) => {
    setSaid(null);
    const result = await (closed ? close : reopen).send({ pointId: point.id });
    if (result.kind !== "done") return;
    setSaid(
      closed
        ? { text: `${point.name} is closed. Its bags and figures stay.`, undo: point }
        : { text: `${point.name} is open again.`, undo: null },
    );
    router.refresh();
  };

  const columns: readonly Column<PointReceipt>[] = [
    { key: "name", header: "Name", head: true, cell: (point) => point.name },
    { key: "kind", header: "Kind", cell: (point) => POINT_KIND_NAMES[point.kind] },
    {
      key: "state",
      header: "State",
      cell: (point) =>
        point.closedAt === null ? (
          <span className="font-bold text-ok">Open</span>
        ) : (
          <span className="text-soft">Closed</span>
        ),
    },
    {
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (point) => (
        <span className="flex flex-wrap justify-end gap-1">
          <Button
            variant="link"
            size="small"
            aria-label={`Change ${point.name}`}
            onClick={() => setEditing(point)}
          >
            Change
          </Button>
          <Button
            variant="link"
            size="small"
            aria-label={`${point.closedAt === null ? "Close" : "Open"} ${point.name}`}
            busy={close.pending || reopen.pending}
            onClick={() => void setClosed(point, point.closedAt === null)}
          >
            {point.closedAt === null ? "Close" : "Open again"}
          </Button>
        </span>
      ),
    },
  ];

  const addButton = <Button onClick={() => setEditing("new")}>Add a point</Button>;
  return (
    <>
      <PageHeader
        title="Drop-off points"
        titleInBar
        lead="Where people leave plastic. Bags without a tag are entered under two names of the program: At the shed, and Not known."
        actions={points.length > 0 ? addButton : undefined}
      />
      <div className="mb-4 grid gap-3 empty:hidden">
        <CommandNotice command={close} />
        <CommandNotice command={reopen} />
        {said ? (
          <Notice
            tone="ok"
            live="status"
            title={said.text}
            action={
              said.undo ? (
                <Button
                  variant="quiet"
                  size="small"
                  onClick={() => said.undo && void setClosed(said.undo, false)}
                >
                  Undo
                </Button>
              ) : null
            }
          />
        ) : null}
      </div>
      <DataTable
        caption="Drop-off points"
        columns={columns}
        rows={points}
        rowKey={(point) => point.id}
        empty={
          <EmptyState title="No drop-off point yet" action={addButton}>
            Add the places where people leave their bags. Then order tags for each of them.
          </EmptyState>
        }
      />
      {editing === null ? null : (
        <PointDialog
          point={editing === "new" ? null : editing}
          onClose={() => setEditing(null)}
          onSaved={(name) => {
            setEditing(null);
            setSaid({ text: `${name} is saved.`, undo: null });
            router.refresh();
          }}
        />
      )}
    </>
  );
}
