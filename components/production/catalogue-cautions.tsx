import { Notice } from "@/components/ui/notice";

const CAUTIONS = [
  "Ventilate, and extract fumes where they arise; nobody works with heat alone.",
  "Heat-proof gloves and eye protection. No loose sleeves near a press or a saw.",
  "Never heat PVC, nor anything that nobody could identify. Dry PET first.",
  "Never above the polymer's ceiling: there it gives off fumes and breaks down.",
  "Dust and flakes are collected and not washed away.",
] as const;

/** Beside the work, never a box to tick. The machine's manual and local rules come first. */
export function CatalogueCautions() {
  return (
    <Notice tone="warn" title="Take care">
      <ul className="grid list-outside list-disc gap-0.5 pl-5">
        {CAUTIONS.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <p className="mt-1 text-sm text-soft">
        The machine&apos;s manual, local rules and licensed practice come before this page.
      </p>
    </Notice>
  );
}
