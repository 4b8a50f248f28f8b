"use client";

import { WeightField } from "@/components/forms/weight-field";
import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg } from "@/lib/core/mass";
import { MOST_READINGS } from "@/lib/stock/terms";
import type { ReadingValue } from "../weighing/form-values";
import { readingRefusal, readReading } from "../weighing/read-form";
import { rememberScale } from "../weighing/remembered-scale";
import { TareField } from "../weighing/tare-field";
import type { DeskLists } from "../weighing/use-desk-lists";
import { netOfWeighing, withReading, type WeighingValue } from "./weighing-value";

type Props = {
  value: WeighingValue;
  onValue: (value: WeighingValue) => void;
  lists: DeskLists;
  /** Shows at once what is missing, as after a tap on the button. */
  asked: boolean;
  /** Refusals of this weighing by field: "readings.0.grossMilligrams". */
  errors?: Readonly<Record<string, string>>;
  /** Only one reading is possible, as where each goes to a line of its own. */
  single?: boolean;
  /** Where the scale is chosen elsewhere. */
  hideScale?: boolean;
  label?: string;
};

/** Weighing what is in a container: what the scale shows, what carries it, and the net, live. */
export function BinWeighing({
  value,
  onValue,
  lists,
  asked,
  errors = {},
  single = false,
  hideScale = false,
  label = "Net",
}: Props) {
  const scale = lists.scales.find(({ id }) => id === value.scaleId);
  const net = netOfWeighing(value, lists.containers);
  const put = (at: number, reading: ReadingValue) =>
    onValue({ ...value, readings: value.readings.map((one, i) => (i === at ? reading : one)) });
  return (
    <div className="grid gap-4">
      {value.readings.map((reading, at) => {
        const refusal = readingRefusal(reading, lists.containers, scale);
        const read = readReading(reading, lists.containers);
        const problems = read.ok ? {} : read.problems;
        const refused =
          errors[`readings.${at}.grossMilligrams`] ?? errors["reading.grossMilligrams"];
        return (
          <div key={at} className="grid gap-3">
            <WeightField
              label={
                value.readings.length > 1 ? `The scale shows, reading ${at + 1}` : "The scale shows"
              }
              size={at === 0 && value.readings.length === 1 ? "huge" : "plain"}
              text={reading.gross}
              onText={(gross) => put(at, { ...reading, gross })}
              error={refusal ?? refused}
              showProblem={asked}
            />
            <div className="grid grid-cols-2 gap-3">
              <TareField
                label="Container"
                name={`container-${at}`}
                value={reading.container}
                listed={lists.containers.filter((tare) => tare.kind === "container")}
                onChange={(container) => put(at, { ...reading, container })}
                error={problems["container.text"]}
              />
              <TareField
                label="Sack"
                name={`sack-${at}`}
                value={reading.sack}
                listed={lists.containers.filter((tare) => tare.kind === "sack")}
                onChange={(sack) => put(at, { ...reading, sack })}
                error={problems["sack.text"]}
              />
            </div>
          </div>
        );
      })}
      <div className="flex flex-wrap items-end justify-between gap-3">
        <div className="min-w-0 grow basis-44">
          <WeightDisplay
            label={label}
            value={net === null ? "–" : formatKg(net)}
            largest={36}
            live
          />
        </div>
        {single || value.readings.length >= MOST_READINGS ? null : (
          <span className="flex flex-wrap gap-x-2">
            {value.readings.length > 1 ? (
              <Button
                variant="link"
                size="small"
                onClick={() => onValue({ ...value, readings: value.readings.slice(0, -1) })}
              >
                Remove the last
              </Button>
            ) : null}
            <Button variant="link" size="small" onClick={() => onValue(withReading(value))}>
              Another reading
            </Button>
          </span>
        )}
      </div>
      {hideScale ? null : (
        <SelectField
          label="Scale"
          value={value.scaleId}
          placeholder={scale ? undefined : "Choose the scale"}
          onChange={(event) => {
            rememberScale(event.target.value);
            onValue({ ...value, scaleId: event.target.value });
          }}
          options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
          error={asked && !scale ? "Choose the scale." : undefined}
        />
      )}
    </div>
  );
}
