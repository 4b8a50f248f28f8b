import { Notice } from "@/components/ui/notice";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { Machine, Piece } from "@/lib/production/contract/catalogue";
import { cautionsFor } from "@/lib/production/rules/cautions";
import type { Heatable } from "@/lib/production/terms";

type Props = { piece: Piece; polymer: Heatable; machine: Machine | null };

/** Beside the work, never a box to tick. The machine's manual and local rules come first. */
export function HeatCautions({ piece, polymer, machine }: Props) {
  const { temperature, lines } = cautionsFor(piece.method, polymer, machine);
  return (
    <Notice tone="warn" title="Take care" className="mt-4">
      {temperature ? (
        <p className="font-bold">
          {POLYMER_NAMES[polymer].name}: {temperature}
        </p>
      ) : null}
      <ul className="list-outside list-disc pl-5">
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <p className="mt-1 text-sm text-soft">
        The machine&apos;s manual, local rules and licensed practice come before this page.
      </p>
    </Notice>
  );
}
