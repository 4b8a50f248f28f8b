import type * as z from "zod";
import { formatMeasure } from "@/lib/core/measure";
import type { Machine, machineDataSchema } from "@/lib/production/contract/catalogue";
import { HEATABLE, type Heatable, type Method } from "@/lib/production/terms";

/** A machine as its dialog holds it: text as typed, also of fields that the chosen method does not show. */
export type MachineTyped = {
  name: string;
  method: Method;
  plateLengthUm: string;
  plateWidthUm: string;
  barrelMm3: string;
  usableThousandths: string;
  leastShotMilligrams: string;
  purgeMilligrams: string;
  meltSeconds: string;
  cycleSeconds: string;
  ratedWatts: string;
  /** One for each polymer, in the order of HEATABLE. */
  setPoints: { polymer: Heatable; celsius: string }[];
};

const orEmpty = (count: number | null | undefined): string => String(count ?? "");

/** What the dialog starts with; null: a new machine. */
export function typedMachine(machine: Machine | null): MachineTyped {
  return {
    name: machine?.name ?? "",
    method: machine?.method ?? "pressing",
    plateLengthUm: formatMeasure(machine?.plateLengthUm ?? null, "length"),
    plateWidthUm: formatMeasure(machine?.plateWidthUm ?? null, "length"),
    barrelMm3: formatMeasure(machine?.barrelMm3 ?? null, "volume"),
    usableThousandths: formatMeasure(machine?.usableThousandths ?? 900, "share"),
    leastShotMilligrams: formatMeasure(machine?.leastShotMilligrams ?? null, "mass"),
    purgeMilligrams: formatMeasure(machine?.purgeMilligrams ?? null, "mass"),
    meltSeconds: orEmpty(machine?.meltSeconds),
    cycleSeconds: orEmpty(machine?.cycleSeconds),
    ratedWatts: orEmpty(machine?.ratedWatts),
    setPoints: HEATABLE.map((polymer) => ({
      polymer,
      celsius: orEmpty(machine?.setPoints.find((one) => one.polymer === polymer)?.celsius),
    })),
  };
}

/** What the chosen method asks for; the text of other fields is not sent and not judged. */
export function askedMachine(typed: MachineTyped): z.input<typeof machineDataSchema> {
  const { method } = typed;
  const only = (of: Method, text: string): string => (method === of ? text : "");
  const heats = method !== "cutting";
  return {
    ...typed,
    plateLengthUm: only("pressing", typed.plateLengthUm),
    plateWidthUm: only("pressing", typed.plateWidthUm),
    barrelMm3: only("moulding", typed.barrelMm3),
    usableThousandths: only("moulding", typed.usableThousandths),
    leastShotMilligrams: only("moulding", typed.leastShotMilligrams),
    purgeMilligrams: only("moulding", typed.purgeMilligrams),
    meltSeconds: heats ? typed.meltSeconds : "0",
    setPoints: typed.setPoints.map(({ polymer, celsius }) => ({
      polymer,
      celsius: heats ? celsius : "",
    })),
  };
}
