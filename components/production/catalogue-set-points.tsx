import type { UseFormRegister } from "react-hook-form";
import { TextField } from "@/components/ui/text-field";
import { CEILING_CELSIUS, HEATABLE } from "@/lib/production/terms";
import type { MachineTyped } from "./catalogue-machine-typed";
import { polymerName } from "./catalogue-words";

type Props = {
  register: UseFormRegister<MachineTyped>;
  /** By place in HEATABLE. */
  errorOf: (at: number) => string | undefined;
};

/** The lead's own temperature of a machine for each polymer, beside what it may never exceed. */
export function CatalogueSetPoints({ register, errorOf }: Props) {
  return (
    <fieldset className="min-w-0">
      <legend className="font-bold">Set to</legend>
      <p className="mt-0.5 mb-2 text-sm text-soft">
        What works on this machine. Leave empty what it never makes.
      </p>
      <div className="grid grid-cols-2 items-start gap-x-4 gap-y-3 wide:grid-cols-3">
        {HEATABLE.map((polymer, at) => (
          <TextField
            key={polymer}
            {...register(`setPoints.${at}.celsius`)}
            label={polymerName(polymer)}
            hint={`never above ${CEILING_CELSIUS[polymer]} °C`}
            unit="°C"
            mono
            inputMode="numeric"
            autoComplete="off"
            error={errorOf(at)}
          />
        ))}
      </div>
    </fieldset>
  );
}
