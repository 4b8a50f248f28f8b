/** Invariant: one material reads the same everywhere. Its polymer is shown by the trade's usual name. */
import {
  FORM_NAMES,
  KIND_NAMES,
  POLYMER_NAMES,
  WASH_NAMES,
  type Form,
  type Kind,
  type PolymerAnswer,
  type WashState,
} from "@/lib/core/plastics";

/** "Blue HDPE"; "Blue, not sure" for stock that nobody has identified. */
export function pileName(colourName: string, polymer: PolymerAnswer): string {
  const { name, resinCode } = POLYMER_NAMES[polymer];
  if (resinCode === null) return `${colourName}, ${name.toLowerCase()}`;
  return `${colourName} ${polymer === "O" ? "other plastic" : name}`;
}

/** "lids, whole, as received" */
export function pileDetail(material: { kind: Kind; form: Form; wash: WashState }): string {
  return [KIND_NAMES[material.kind], FORM_NAMES[material.form], WASH_NAMES[material.wash]]
    .map((word) => word.toLowerCase())
    .join(", ");
}
