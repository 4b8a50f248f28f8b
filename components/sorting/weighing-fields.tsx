"use client";

import { WeightField } from "@/components/forms/weight-field";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg } from "@/lib/core/mass";
import type { ReadingValue } from "../weighing/form-values";
import { readingRefusal, readReading, type ListedTare } from "../weighing/read-form";
import { TareField } from "../weighing/tare-field";
import type { DeskScale } from "../weighing/use-desk-lists";
import { netOf } from "./draft";

type Props = {
  value: ReadingValue;
  onValue: (value: ReadingValue) => void;
  scale: DeskScale | undefined;
  tares: readonly ListedTare[];
  /** Shows at once what is missing, as after a tap on the button. */
  asked: boolean;
  /** Before each field's name, where there are several of these: "readings.0." */
  prefix?: string;
  /** A refusal of what the scale shows. */
  error?: string | undefined;
};

/** One weighing: what the scale shows, what carries it, and the net, live. */
export function WeighingFields({ value, onValue, scale, tares, asked, prefix = "", error }: Props) {
  const net = netOf(value, tares);
  const refusal = readingRefusal(value, tares, scale);
  const read = readReading(value, tares);
  const problems = read.ok ? {} : read.problems;
  return (
    <div className="grid gap-3">
      <div className="grid grid-cols-2 gap-4">
        <WeightField
          label="The scale shows"
          name={`${prefix}gross`}
          text={value.gross}
          onText={(gross) => onValue({ ...value, gross })}
          error={error ?? refusal ?? undefined}
          showProblem={asked}
        />
        <WeightDisplay
          label="Net"
          value={net === null || refusal ? "–" : formatKg(net)}
          largest={40}
          live
        />
      </div>
      <div className="grid grid-cols-2 gap-3">
        <TareField
          label="Container"
          name={`${prefix}container`}
          value={value.container}
          listed={tares.filter((tare) => tare.kind === "container")}
          onChange={(container) => onValue({ ...value, container })}
          error={problems["container.text"]}
        />
        <TareField
          label="Sack"
          name={`${prefix}sack`}
          value={value.sack}
          listed={tares.filter((tare) => tare.kind === "sack")}
          onChange={(sack) => onValue({ ...value, sack })}
          error={problems["sack.text"]}
        />
      </div>
    </div>
  );
}
