import { Cautions } from "@/components/ui/cautions";
import type { PolymerAnswer } from "@/lib/core/plastics";
import type { StepKind } from "@/lib/stock/terms";

const CAUTIONS: Record<StepKind, readonly string[]> = {
  shredding: [
    "Eye protection, and hearing protection where the machine is loud. No loose sleeves or gloves near the blades.",
    "Switch off and lock out before clearing, cleaning or opening. Never reach in.",
    "Dust and flakes are collected and not washed away: no drain, no sweeping outside.",
  ],
  washing: [
    "Wash water carries labels, dirt and small pieces: strain it, collect what stays, and let none of it down the drain.",
    "Gloves for dirty items. Nothing that held chemicals, oil or medicine.",
  ],
  drying: [
    "Dry without flame or glowing heat, with air around it; damp stock in a closed bin goes mouldy.",
  ],
};

const UNKNOWN: readonly PolymerAnswer[] = ["mixed", "not-sure"];

/** Beside the work, never a box to tick. The machine's manual and local rules come first. */
export function StepCautions({ kind, polymer }: { kind: StepKind; polymer: PolymerAnswer | null }) {
  const extra =
    kind !== "shredding" || polymer === null
      ? null
      : polymer === "PVC"
        ? "This is PVC: its dust is to be kept off skin and out of the air, and it can never be heated. Clean the machine after it."
        : UNKNOWN.includes(polymer)
          ? "Nobody knows what this is. Shredded it can no longer be told apart, and it can never be heated; identify it first if that is possible."
          : null;
  return <Cautions lines={[...(extra ? [extra] : []), ...CAUTIONS[kind]]} />;
}
