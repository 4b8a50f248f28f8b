/**
 * Invariant: what a method cannot take never counts as enough; where steps would make it fit, they are named in the
 * order in which they are done.
 */
import type { Form, WashState } from "@/lib/core/plastics";
import type { StepKind } from "@/lib/stock/terms";
import { METHOD_FORMS, METHOD_WASH, type Method } from "../terms";

type Material = { form: Form; wash: WashState };

/** Can the method take it as it is? */
export function isUsable(method: Method, { form, wash }: Material): boolean {
  return METHOD_FORMS[method].includes(form) && METHOD_WASH[method].includes(wash);
}

/**
 * Steps that make a material fit for a method; none for one that fits, null where no step leads there (a sheet is
 * pressed, not stepped).
 */
export function stepsBefore(method: Method, { form, wash }: Material): readonly StepKind[] | null {
  const steps: StepKind[] = [];
  if (!METHOD_WASH[method].includes(wash)) {
    if (wash === "as-received") steps.push("washing");
    steps.push("drying");
  }
  if (!METHOD_FORMS[method].includes(form)) {
    if (!METHOD_FORMS[method].includes("flake")) return null;
    steps.push("shredding");
  }
  return steps;
}
