"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { ListSection } from "@/components/ui/list-section";
import { RowActions } from "@/components/ui/row-actions";
import { formatMeasure } from "@/lib/core/measure";
import { type Piece, type Tool } from "@/lib/production/contract/catalogue";
import { restoreToolEndpoint, retireToolEndpoint } from "@/lib/production/contract/retiring";
import { CatalogueToolDialog } from "./catalogue-tool-dialog";
import { countWords, gramsOf } from "./catalogue-words";

type Props = {
  /** For who may edit, the retired ones too, last. */
  tools: readonly Tool[];
  /** All of them: a tool may name one that is retired. */
  pieces: readonly Piece[];
  mayEdit: boolean;
};
type Open = { what: "edit"; tool: Tool | null };

/** The moulds, from the first prototype to the one that makes several at once. */
export function CatalogueTools({ tools, pieces, mayEdit }: Props) {
  const router = useRouter();
  const [open, setOpen] = useState<Open | null>(null);
  const retire = useCommand(retireToolEndpoint);
  const restore = useCommand(restoreToolEndpoint);
  const setRetired = async ({ id }: Tool, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ toolId: id });
    if (result.kind === "done") router.refresh();
  };
  const close = () => setOpen(null);
  const saved = () => {
    close();
    router.refresh();
  };
  const moulded = pieces.filter(
    ({ method, retiredAt }) => method === "moulding" && retiredAt === null,
  );
  const columns: Column<Tool>[] = [
    {
      key: "name",
      header: "Tool",
      head: true,
      cell: ({ name }) => <span className="block min-w-32 wrap-anywhere">{name}</span>,
    },
    { key: "piece", header: "Makes", cell: ({ pieceId }) => pieceCell(pieces, pieceId) },
    {
      key: "cavities",
      header: "Cavities",
      cell: ({ cavities, gates }) => (
        <>
          <span className="font-mono">{cavities}</span>
          <span className="block text-sm whitespace-nowrap text-soft">
            {gates} {gates === 1 ? "gate" : "gates"}
          </span>
        </>
      ),
    },
    {
      key: "runner",
      header: "Sprue and runners, g",
      align: "figure",
      cell: ({ runnerMilligrams }) => gramsOf(runnerMilligrams),
    },
    {
      key: "start",
      header: "Start-up",
      cell: ({ startUpShots, goodThousandths, preheatMinutes }) => (
        <>
          {startUpShots} {startUpShots === 1 ? "shot" : "shots"}
          {preheatMinutes === 0 ? "" : `, ${preheatMinutes} min preheat`}
          <span className="block text-sm whitespace-nowrap text-soft">
            {formatMeasure(goodThousandths, "share")} % good
          </span>
        </>
      ),
    },
    {
      key: "shots",
      header: "Shots before",
      align: "figure",
      cell: ({ shotsBefore }) => countWords(shotsBefore),
    },
    { key: "service", header: "Service due", cell: serviceCell },
    {
      key: "cost",
      header: "Cost",
      align: "figure",
      cell: ({ costCents }) => formatMeasure(costCents, "money"),
    },
  ];
  if (mayEdit) {
    columns.push({
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (tool) => (
        <RowActions
          name={tool.name}
          onChange={() => setOpen({ what: "edit", tool })}
          retired={tool.retiredAt !== null}
          busy={retire.pending || restore.pending}
          onRetire={(retired) => void setRetired(tool, retired)}
        />
      ),
    });
  }
  const addButton =
    mayEdit && moulded.length > 0 ? (
      <Button size="small" variant="quiet" onClick={() => setOpen({ what: "edit", tool: null })}>
        Add a tool
      </Button>
    ) : null;
  const choices =
    open?.what === "edit" && open.tool
      ? [...moulded, ...pieces.filter(({ id }) => id === open.tool?.pieceId && !hasId(moulded, id))]
      : moulded;
  return (
    <ListSection title="Tools" action={tools.length > 0 ? addButton : null}>
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Tools"
        columns={columns}
        rows={tools}
        rowKey={({ id }) => id}
        empty={
          <EmptyState title="No tool yet" as="h3" action={addButton} seed={23}>
            {!mayEdit
              ? "A lead enters the moulds."
              : moulded.length === 0
                ? "A tool is the mould of a piece. Add a moulded piece first; pressing and cutting need none."
                : "Add the mould of a piece: a first prototype with one cavity and one gate will do. Shots and time are worked out from it."}
          </EmptyState>
        }
      />
      {open?.what === "edit" ? (
        <CatalogueToolDialog tool={open.tool} pieces={choices} onClose={close} onSaved={saved} />
      ) : null}
    </ListSection>
  );
}

const hasId = (pieces: readonly Piece[], id: string): boolean =>
  pieces.some((piece) => piece.id === id);

function pieceCell(pieces: readonly Piece[], pieceId: string) {
  const piece = pieces.find(({ id }) => id === pieceId);
  if (!piece) return "–";
  return (
    <span className="block min-w-24 wrap-anywhere">
      {piece.name}
      {piece.retiredAt === null ? "" : ", retired"}
    </span>
  );
}

function serviceCell({ serviceAtShots, shotsBefore }: Tool) {
  if (serviceAtShots === null) return <span className="text-soft">not counted</span>;
  const left = serviceAtShots - shotsBefore;
  return (
    <>
      <span className="whitespace-nowrap">at {countWords(serviceAtShots)}</span>
      {left <= 0 ? (
        <strong className="block text-sm text-warn">due now</strong>
      ) : (
        <span className="block text-sm whitespace-nowrap text-soft">{countWords(left)} left</span>
      )}
    </>
  );
}
