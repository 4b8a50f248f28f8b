import { Cautions } from "@/components/ui/cautions";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { Machine, Piece } from "@/lib/production/contract/catalogue";
import { cautionsFor } from "@/lib/production/rules/cautions";
import type { Heatable } from "@/lib/production/terms";

type Props = { piece: Piece; polymer: Heatable; machine: Machine | null };

/** What protects people while this piece is made of this polymer, and what the machine is set to. */
export function HeatCautions({ piece, polymer, machine }: Props) {
  const { temperature, lines } = cautionsFor(piece.method, polymer, machine);
  return (
    <Cautions
      lead={temperature ? `${POLYMER_NAMES[polymer].name}: ${temperature}` : null}
      lines={lines}
      className="mt-4"
    />
  );
}
