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
import { KIND_NAMES, KINDS } from "@/lib/core/plastics";
import { type Density, type Piece } from "@/lib/production/contract/catalogue";
import { restorePieceEndpoint, retirePieceEndpoint } from "@/lib/production/contract/retiring";
import { pieceMass } from "@/lib/production/rules/plan";
import { inGrams, sheetWords } from "@/lib/production/rules/working";
import { HEATABLE, METHOD_NAMES } from "@/lib/production/terms";
import { CataloguePieceDialog } from "./catalogue-piece-dialog";
import { CatalogueWeighDialog } from "./catalogue-weigh-dialog";
import { gramsOf, pieceSheet, polymerName } from "./catalogue-words";

type Props = {
  /** For who may edit, the retired ones too, last. */
  pieces: readonly Piece[];
  densities: readonly Density[];
  mayEdit: boolean;
};
type Open = { what: "edit"; piece: Piece | null } | { what: "weigh"; piece: Piece };

/** What the workshop makes. */
export function CataloguePieces({ pieces, densities, mayEdit }: Props) {
  const router = useRouter();
  const [open, setOpen] = useState<Open | null>(null);
  const retire = useCommand(retirePieceEndpoint);
  const restore = useCommand(restorePieceEndpoint);
  const setRetired = async ({ id }: Piece, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ pieceId: id });
    if (result.kind === "done") router.refresh();
  };
  const close = () => setOpen(null);
  const saved = () => {
    close();
    router.refresh();
  };
  const columns: Column<Piece>[] = [
    {
      key: "name",
      header: "Piece",
      head: true,
      cell: ({ name }) => <span className="block min-w-28 wrap-anywhere">{name}</span>,
    },
    { key: "method", header: "Made by", cell: methodCell },
    {
      key: "plastic",
      header: "Of",
      cell: ({ polymers, kinds }) => (
        <>
          {inOrder(HEATABLE, polymers).map(polymerName).join(", ")}
          <span className="block text-sm text-soft">{kindWords(kinds)}</span>
        </>
      ),
    },
    {
      key: "mass",
      header: "One is",
      cell: (piece) => {
        const { milligrams, known } = massOfOne(piece, densities);
        return (
          <>
            <span className="font-mono whitespace-nowrap">
              {known.startsWith("computed") ? inGrams(milligrams) : `${gramsOf(milligrams)} g`}
            </span>
            <span className="block text-sm text-soft">{known}</span>
          </>
        );
      },
    },
    {
      key: "price",
      header: "Price",
      align: "figure",
      cell: ({ priceCents }) => (priceCents === null ? "–" : formatMeasure(priceCents, "money")),
    },
    {
      key: "cost",
      header: "Other cost",
      align: "figure",
      cell: ({ otherCostCents }) => formatMeasure(otherCostCents, "money"),
    },
    {
      key: "heated",
      header: "Heated before",
      cell: ({ mostHeatedThousandths: most }) =>
        most === null ? (
          <span className="text-soft">any share</span>
        ) : (
          <span className="whitespace-nowrap">up to {formatMeasure(most, "share")} %</span>
        ),
    },
  ];
  if (mayEdit) {
    columns.push({
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (piece) => (
        <RowActions
          name={piece.name}
          onChange={() => setOpen({ what: "edit", piece })}
          retired={piece.retiredAt !== null}
          busy={retire.pending || restore.pending}
          onRetire={(retired) => void setRetired(piece, retired)}
        >
          <Button
            variant="link"
            size="small"
            aria-label={`Weigh ${piece.name}`}
            onClick={() => setOpen({ what: "weigh", piece })}
          >
            Weigh
          </Button>
        </RowActions>
      ),
    });
  }
  const addButton = (variant: "act" | "quiet") => (
    <Button size="small" variant={variant} onClick={() => setOpen({ what: "edit", piece: null })}>
      Add a piece
    </Button>
  );
  return (
    <ListSection title="Pieces" action={mayEdit && pieces.length > 0 ? addButton("quiet") : null}>
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Pieces"
        columns={columns}
        rows={pieces}
        rowKey={({ id }) => id}
        empty={
          <EmptyState
            title="No piece yet"
            as="h3"
            action={mayEdit ? addButton("act") : null}
            seed={11}
          >
            {mayEdit
              ? "Begin here: what do you make? Its size or mass tells how much plastic a run needs. Moulds and machines come after it."
              : "A lead enters what the workshop makes. Runs can be planned after that."}
          </EmptyState>
        }
      />
      {open?.what === "edit" ? (
        <CataloguePieceDialog
          piece={open.piece}
          densities={densities}
          onClose={close}
          onSaved={saved}
        />
      ) : null}
      {open?.what === "weigh" ? (
        <CatalogueWeighDialog
          piece={open.piece}
          now={massOfOne(open.piece, densities)}
          onClose={close}
          onSaved={saved}
        />
      ) : null}
    </ListSection>
  );
}

function inOrder<T>(order: readonly T[], chosen: readonly T[]): T[] {
  return order.filter((one) => chosen.includes(one));
}

function kindWords(kinds: Piece["kinds"]): string {
  const names = inOrder(KINDS, kinds).map((kind) => KIND_NAMES[kind].toLowerCase());
  return kinds.length === KINDS.length ? "any kind" : names.join(", ");
}

function methodCell(piece: Piece) {
  const sheet = pieceSheet(piece);
  const { method, trimThousandths, piecesPerSheet } = piece;
  return (
    <>
      {METHOD_NAMES[method]}
      {sheet ? (
        <span className="block text-sm text-soft">
          {method === "cutting" ? `${piecesPerSheet ?? 1} from ` : ""}
          <span className="whitespace-nowrap">{sheetWords(sheet)}</span>
          {trimThousandths ? `, ${formatMeasure(trimThousandths, "share")}\u00a0% trim` : ""}
        </span>
      ) : null}
    </>
  );
}

/** Milligrams of one piece as plans use them, and how they are known; computed for its first polymer. */
function massOfOne(piece: Piece, densities: readonly Density[]) {
  const density = densities.find(({ polymer }) => piece.polymers.includes(polymer));
  const milligrams = density ? pieceMass(piece, density) : 0;
  if (piece.weighedMilligrams !== null) {
    return { milligrams, known: `mean of ${piece.weighedPieces ?? 1} weighed` };
  }
  if (piece.massMilligrams !== null) return { milligrams, known: "as entered" };
  return { milligrams, known: `computed${density ? ` in ${polymerName(density.polymer)}` : ""}` };
}
