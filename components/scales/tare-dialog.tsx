"use client";

import { useState } from "react";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { WeightField } from "@/components/forms/weight-field";
import { DataTable } from "@/components/ui/data-table";
import { SelectField } from "@/components/ui/select-field";
import { formatMilligrams, readMass } from "@/lib/core/mass";
import { dayOf, formatClock, formatDay } from "@/lib/core/time";
import { reweighContainerEndpoint, type ContainerReceipt } from "@/lib/scales/contract/containers";
import type { ScaleReceipt } from "@/lib/scales/contract/scales";
import type { Tare } from "@/lib/scales/queries/tares";

type Props = {
  container: ContainerReceipt;
  /** Newest first. */
  tares: readonly Tare[];
  /** Those in use. */
  scales: readonly ScaleReceipt[];
  timeZone: string;
  onClose: () => void;
  onSaved: () => void;
};

/** Weighs a container or sack again, empty; and shows what it weighed when. */
export function TareDialog({ container, tares, scales, timeZone, onClose, onSaved }: Props) {
  const reweigh = useCommand(reweighContainerEndpoint);
  const [scaleId, setScaleId] = useState(scales[0]?.id ?? "");
  const [text, setText] = useState("");
  const [asked, setAsked] = useState(false);
  async function send() {
    setAsked(true);
    const reading = readMass(text, "kg");
    if (!reading.ok || scaleId === "") return;
    const result = await reweigh.send({
      containerId: container.id,
      scaleId,
      readingMilligrams: reading.milligrams,
    });
    if (result.kind === "done") onSaved();
  }
  return (
    <FormDialog
      title={`Weigh ${container.name} again`}
      submit="Save its weight"
      onSubmit={send}
      onClose={onClose}
      command={reweigh}
      shownFields={["readingMilligrams", "scaleId"]}
      after={
        <>
          <div className="mt-5">
            <DataTable
              caption="What it weighed"
              showCaption
              rows={tares}
              rowKey={({ validFrom }) => validFrom}
              columns={[
                {
                  key: "from",
                  header: "From",
                  head: true,
                  cell: ({ validFrom }) =>
                    `${formatDay(dayOf(validFrom, timeZone))}, ${formatClock(validFrom, timeZone)}`,
                },
                {
                  key: "kg",
                  header: "Empty, kg",
                  align: "figure",
                  cell: ({ tareMilligrams }) => formatMilligrams(tareMilligrams),
                },
                { key: "by", header: "By", cell: ({ byName }) => byName ?? "Not kept" },
              ]}
            />
          </div>
          {container.labelCode === null ? null : (
            <p className="mt-3 text-sm text-soft">
              Its printed label shows the weight of the day it was printed; scanning it takes the
              weight of today.
            </p>
          )}
        </>
      }
    >
      <p>
        Empty and clean, by itself on the scale. It counts from now on; a ticket that still waits on
        a phone keeps the weight of its own time.
      </p>
      <SelectField
        label="Scale"
        value={scaleId}
        onChange={(event) => setScaleId(event.target.value)}
        options={scales.map(({ id, name }) => ({ value: id, label: name }))}
        error={reweigh.fieldErrors.scaleId}
      />
      <WeightField
        label="The scale shows"
        text={text}
        onText={setText}
        showProblem={asked}
        error={reweigh.fieldErrors.readingMilligrams}
      />
    </FormDialog>
  );
}
