"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Cautions } from "@/components/ui/cautions";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { ListSection } from "@/components/ui/list-section";
import { RowActions } from "@/components/ui/row-actions";
import { formatMeasure } from "@/lib/core/measure";
import { type Machine } from "@/lib/production/contract/catalogue";
import { restoreMachineEndpoint, retireMachineEndpoint } from "@/lib/production/contract/retiring";
import { WORKSHOP_CAUTIONS } from "@/lib/production/rules/cautions";
import { CEILING_CELSIUS, HEATABLE, METHOD_NAMES } from "@/lib/production/terms";
import { CatalogueMachineDialog } from "./catalogue-machine-dialog";
import { countWords, exactTime, gramsOf, polymerName } from "./catalogue-words";

type Props = {
  /** For who may edit, the retired ones too, last. */
  machines: readonly Machine[];
  mayEdit: boolean;
};
type Open = { what: "edit"; machine: Machine | null };

/** Press, moulding machine, saw: what they take, how long it lasts, and what they are set to. */
export function CatalogueMachines({ machines, mayEdit }: Props) {
  const router = useRouter();
  const [open, setOpen] = useState<Open | null>(null);
  const retire = useCommand(retireMachineEndpoint);
  const restore = useCommand(restoreMachineEndpoint);
  const setRetired = async ({ id }: Machine, retired: boolean) => {
    const result = await (retired ? retire : restore).send({ machineId: id });
    if (result.kind === "done") router.refresh();
  };
  const close = () => setOpen(null);
  const saved = () => {
    close();
    router.refresh();
  };
  const columns: Column<Machine>[] = [
    {
      key: "name",
      header: "Machine",
      head: true,
      cell: ({ name }) => <span className="block min-w-28 wrap-anywhere">{name}</span>,
    },
    { key: "method", header: "Does", cell: ({ method }) => METHOD_NAMES[method] },
    { key: "takes", header: "Takes", cell: takesCell },
    { key: "time", header: "Time", cell: timeCell },
    {
      key: "power",
      header: "Power",
      cell: ({ ratedWatts }) =>
        ratedWatts === null ? (
          "–"
        ) : (
          <span className="whitespace-nowrap">{countWords(ratedWatts)} W</span>
        ),
    },
    { key: "set", header: "Set to", cell: setPointsCell },
  ];
  if (mayEdit) {
    columns.push({
      key: "actions",
      header: <span className="sr-only">Actions</span>,
      cell: (machine) => (
        <RowActions
          name={machine.name}
          onChange={() => setOpen({ what: "edit", machine })}
          retired={machine.retiredAt !== null}
          busy={retire.pending || restore.pending}
          onRetire={(retired) => void setRetired(machine, retired)}
        />
      ),
    });
  }
  const addButton = mayEdit ? (
    <Button size="small" variant="quiet" onClick={() => setOpen({ what: "edit", machine: null })}>
      Add a machine
    </Button>
  ) : null;
  return (
    <ListSection title="Machines" action={machines.length > 0 ? addButton : null}>
      <CommandNotice command={retire} />
      <CommandNotice command={restore} />
      <DataTable
        caption="Machines"
        columns={columns}
        rows={machines}
        rowKey={({ id }) => id}
        empty={
          <EmptyState title="No machine yet" as="h3" action={addButton} seed={31}>
            {mayEdit
              ? "Add the press, the moulding machine or the saw, with what its plate or barrel takes. A plan then says whether a sheet or a shot fits, and how long it takes."
              : "A lead enters the machines and what they are set to."}
          </EmptyState>
        }
      />
      <Cautions lines={WORKSHOP_CAUTIONS} />
      {open?.what === "edit" ? (
        <CatalogueMachineDialog machine={open.machine} onClose={close} onSaved={saved} />
      ) : null}
    </ListSection>
  );
}

const soft = (text: string) => <span className="block text-sm text-soft">{text}</span>;

function takesCell(machine: Machine) {
  const { plateLengthUm, plateWidthUm, barrelMm3, usableThousandths } = machine;
  if (plateLengthUm !== null && plateWidthUm !== null) {
    return (
      <span className="whitespace-nowrap">
        {formatMeasure(plateLengthUm, "length")} × {formatMeasure(plateWidthUm, "length")} mm
      </span>
    );
  }
  if (barrelMm3 === null) return "–";
  const { leastShotMilligrams: least, purgeMilligrams: purge } = machine;
  const more = [
    ...(least ? [`shots from ${gramsOf(least)} g`] : []),
    ...(purge ? [`${gramsOf(purge)} g purge`] : []),
  ];
  return (
    <>
      {formatMeasure(barrelMm3, "volume")} cm³, {formatMeasure(usableThousandths, "share")} % usable
      {more.length > 0 ? soft(more.join(", ")) : null}
    </>
  );
}

function timeCell({ method, meltSeconds, cycleSeconds }: Machine) {
  if (method === "cutting") return `${exactTime(cycleSeconds)} a sheet`;
  return (
    <>
      {exactTime(meltSeconds)} {method === "pressing" ? "a load" : "a fill"}
      {soft(`${exactTime(cycleSeconds)} ${method === "pressing" ? "to change" : "a shot"}`)}
    </>
  );
}

function setPointsCell({ method, setPoints }: Machine) {
  if (method === "cutting") return "–";
  const set = HEATABLE.flatMap((polymer) => setPoints.filter((one) => one.polymer === polymer));
  if (set.length === 0) return <span className="font-bold text-warn">not set</span>;
  return (
    <ul className="grid gap-0.5">
      {set.map(({ polymer, celsius }) => (
        <li key={polymer}>
          {polymerName(polymer)} <span className="font-mono whitespace-nowrap">{celsius} °C</span>{" "}
          <span className="text-sm whitespace-nowrap text-soft">
            never above {CEILING_CELSIUS[polymer]} °C
          </span>
        </li>
      ))}
    </ul>
  );
}
