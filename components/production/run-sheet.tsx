import { PageHeader } from "@/components/ui/page-header";
import { DataTable, type Column } from "@/components/ui/data-table";
import { QUIET_MODULES, type QrSymbol } from "@/lib/bags/rules/qr";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { Reservation, RunPage } from "@/lib/production/queries/runs";
import { duration, workingOf } from "@/lib/production/rules/working";
import { planFor } from "@/lib/production/rules/plan";
import { BlendTable } from "./blend-table";
import { HeatCautions } from "./heat-cautions";
import { PrintButton } from "./print-button";
import { runTitle } from "./run-title";

type Props = { page: RunPage; symbol: QrSymbol };

/** The sheet that lies beside the machine: amounts by lot with places, settings, cautions, the run's label. */
export function RunSheet({ page, symbol }: Props) {
  const { run, piece, tool, machine, density, reservations } = page;
  const side = symbol.modules + 2 * QUIET_MODULES;
  const parts = { piece, tool, machine, density };
  const plan = planFor(run.wantedPieces, parts);
  const columns: readonly Column<Reservation>[] = [
    { key: "lot", header: "Lot", cell: ({ lotNumber }) => `Lot ${lotNumber}`, head: true },
    {
      key: "colour",
      header: "Colour",
      cell: ({ colourCode }) =>
        run.colours.find((colour) => colour.colourCode === colourCode)?.name ?? colourCode,
    },
    { key: "place", header: "Place", cell: ({ place }) => place || "Not said" },
    { key: "kg", header: "Take, kg", cell: ({ grams }) => formatKg(grams), align: "figure" },
    {
      key: "taken",
      header: "Taken, kg",
      cell: () => <span className="inline-block w-24 border-b border-ink">&nbsp;</span>,
    },
  ];
  return (
    <>
      <PageHeader
        title={runTitle(run)}
        lead={`Run ${run.number}. ${POLYMER_NAMES[run.polymer].name}, ${formatKg(run.needGrams)} kg, ${duration(page.plannedSeconds)}.`}
        back={{ href: `/runs/${run.number}`, label: `Run ${run.number}` }}
        actions={<PrintButton />}
      />
      <div className="flex flex-wrap items-start gap-6">
        <div className="min-w-0 grow basis-80">
          <BlendTable run={run} reservations={reservations} />
          <div className="mt-5">
            <DataTable
              caption="What to take from which lot"
              showCaption
              columns={columns}
              rows={reservations}
              rowKey={({ id }) => id}
              empty={
                <p className="text-soft">
                  Nothing is reserved yet, so no lots are named. Reserve, then print again.
                </p>
              }
            />
          </div>
        </div>
        <figure className="text-center">
          <svg
            role="img"
            aria-label={`QR symbol of run ${run.number}`}
            viewBox={`${-QUIET_MODULES} ${-QUIET_MODULES} ${side} ${side}`}
            className="block h-auto w-[38mm]"
          >
            <rect x={-QUIET_MODULES} y={-QUIET_MODULES} width={side} height={side} fill="#fff" />
            <path d={symbol.path} fillRule="evenodd" fill="#000" />
          </svg>
          <figcaption className="mt-1 font-mono font-bold">{formatCode(page.labelCode)}</figcaption>
        </figure>
      </div>
      <dl className="mt-5 grid gap-x-8 gap-y-1 wide:grid-cols-2">
        {tool ? <Setting label="Tool">{tool.name}</Setting> : null}
        {machine ? <Setting label="Machine">{machine.name}</Setting> : null}
        {page.plannedShots === null ? null : <Setting label="Shots">{page.plannedShots}</Setting>}
      </dl>
      {plan.kind === "need" ? (
        <ul className="mt-3 font-mono text-sm tracking-tight">
          {workingOf(run.wantedPieces, plan.need, parts).map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      ) : null}
      <HeatCautions piece={piece} polymer={run.polymer} machine={machine} />
    </>
  );
}

function Setting({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <div className="flex justify-between gap-4 border-b border-rule py-1">
      <dt className="text-soft">{label}</dt>
      <dd className="font-bold">{children}</dd>
    </div>
  );
}
