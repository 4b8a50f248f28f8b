"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { ListSection } from "@/components/ui/list-section";
import { Button } from "@/components/ui/button";
import { DataTable, type Column } from "@/components/ui/data-table";
import { setDensityEndpoint, type Density } from "@/lib/production/contract/catalogue";
import { REFERENCE } from "@/lib/production/rules/reference";
import { CatalogueDensityDialog } from "./catalogue-density-dialog";
import { polymerName } from "./catalogue-words";

type Props = { densities: readonly Density[]; mayEdit: boolean };

/** What a cubic centimetre of each polymer weighs, with where that is from. */
export function CatalogueDensities({ densities, mayEdit }: Props) {
  const router = useRouter();
  const [editing, setEditing] = useState<Density | null>(null);
  const [said, setSaid] = useState("");
  const back = useCommand(setDensityEndpoint);
  const backToReference = async ({ polymer }: Density) => {
    const result = await back.send({ polymer, mgPerCm3: null, source: "" });
    if (result.kind !== "done") return;
    setSaid(`${polymerName(polymer)} is planned with the reference again.`);
    router.refresh();
  };
  const columns: Column<Density>[] = [
    {
      key: "polymer",
      header: "Polymer",
      head: true,
      cell: ({ polymer }) => polymerName(polymer),
    },
    {
      key: "density",
      header: "g/cm³",
      align: "figure",
      cell: ({ mgPerCm3 }) => (mgPerCm3 / 1000).toFixed(3),
    },
    {
      key: "source",
      header: "From",
      cell: ({ polymer, source, own }) =>
        own ? (
          <span className="wrap-anywhere">
            <strong>Your own:</strong> {source}
            <span className="block text-sm text-soft">
              reference {(REFERENCE[polymer].mgPerCm3 / 1000).toFixed(3)}
            </span>
          </span>
        ) : (
          <span className="text-soft">Reference, {source}</span>
        ),
    },
  ];
  if (mayEdit) {
    columns.push({
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (density) => (
        <span className="-mr-2 flex flex-wrap items-center justify-end">
          {density.own ? (
            <Button
              variant="link"
              size="small"
              busy={back.pending}
              aria-label={`Back to the reference for ${polymerName(density.polymer)}`}
              onClick={() => void backToReference(density)}
            >
              Back to the reference
            </Button>
          ) : null}
          <Button
            variant="link"
            size="small"
            aria-label={`Change the density of ${polymerName(density.polymer)}`}
            onClick={() => setEditing(density)}
          >
            Change
          </Button>
        </span>
      ),
    });
  }
  return (
    <ListSection title="Densities" action={null}>
      <p className="max-w-[70ch] text-soft">
        Where nothing was weighed, mass is volume × density. Own plastic differs with its grade and
        its dyes: a sheet of known size, weighed, gives a better figure than any table.
      </p>
      <CommandNotice command={back} />
      <p role="status" className="sr-only">
        {said}
      </p>
      <DataTable
        caption="Densities"
        columns={columns}
        rows={densities}
        rowKey={({ polymer }) => polymer}
      />
      {editing ? (
        <CatalogueDensityDialog
          density={editing}
          onClose={() => setEditing(null)}
          onSaved={() => {
            setEditing(null);
            router.refresh();
          }}
        />
      ) : null}
    </ListSection>
  );
}
