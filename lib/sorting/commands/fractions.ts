/** Reading what a sorting sends: every pile and reject with its scale, tare, material or reason. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { REJECT } from "@/lib/ledger/terms";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import { prepared, type Tx } from "@/lib/platform/database";
import { getContainer, type Scale } from "@/lib/scales/queries";
import type { ReadingInput } from "@/lib/core/schemas";
import {
  mpeOf,
  netGramsOf,
  refuseReadings,
  tareMilligrams,
  type Reading,
} from "@/lib/weighing/rules";
import type { CloseSortingInput } from "../contract";
import { loadsOf, type Load } from "../rules";

export type Fraction = {
  /** {@link REJECT} for a reject. */
  materialId: number;
  rejectReason: string | null;
  grossMilligrams: number;
  tareMilligrams: number;
  netGrams: number;
  mpeMilligrams: number;
  loads: Load[];
};

type Path = readonly (string | number)[];

/**
 * @throws AppError `unknown-container`, `above-max`, `not-a-step`, `tare-above-gross`, `net-zero`,
 *   `unknown-colour`, `unknown-reason`, each with the path of the field
 */
export function readFractions(tx: Tx, input: CloseSortingInput, scale: Scale): Fraction[] {
  return [
    ...input.piles.map((pile, at) => {
      const path = ["piles", at] as const;
      requireListed(tx, "colours", pile.colourCode, "unknown-colour", [...path, "colourCode"]);
      const { reading, ...material } = pile;
      return {
        ...weigh(tx, reading, scale, [...path, "reading"]),
        materialId: ensureMaterial(tx, material),
        rejectReason: null,
      };
    }),
    ...input.rejects.map((reject, at) => {
      const path = ["rejects", at] as const;
      requireListed(tx, "reject_reasons", reject.reason, "unknown-reason", [...path, "reason"]);
      return {
        ...weigh(tx, reject.reading, scale, [...path, "reading"]),
        materialId: REJECT,
        rejectReason: reject.reason,
      };
    }),
  ];
}

/** A retired colour or reason is refused too: a form that was open since then must look again. */
function requireListed(
  tx: Tx,
  table: "colours" | "reject_reasons",
  code: string,
  problem: "unknown-colour" | "unknown-reason",
  path: Path,
): void {
  const found = prepared(
    tx.client,
    `select 1 from ${table} where code = ? and retired_at is null`,
  ).get(code);
  if (!found) throw new AppError(problem, {}, path);
}

function weigh(
  tx: Tx,
  sent: ReadingInput,
  scale: Scale,
  path: Path,
): Omit<Fraction, "materialId" | "rejectReason"> {
  // The list's weight counts, whatever the client believed it to be; a typed tare is taken as it is.
  const reading: Reading = {
    ...sent,
    containerTareMilligrams: tareOf(tx, sent.containerId, sent.containerTareMilligrams, [
      ...path,
      "containerId",
    ]),
    sackTareMilligrams: tareOf(tx, sent.sackId, sent.sackTareMilligrams, [...path, "sackId"]),
  };
  const refusal = refuseReadings(scale, [reading]);
  if (refusal) throw new AppError(refusal.code, refusal.detail, [...path, "grossMilligrams"]);
  return {
    grossMilligrams: reading.grossMilligrams,
    tareMilligrams: tareMilligrams(reading),
    netGrams: netGramsOf([reading]),
    mpeMilligrams: mpeOf(scale, [reading]),
    loads: loadsOf(reading, scale),
  };
}

function tareOf(
  tx: Tx,
  containerId: ReadingInput["containerId"],
  typedMilligrams: number,
  path: Path,
): number {
  if (containerId === null) return typedMilligrams;
  const container = getContainer(tx, containerId);
  if (!container) throw new AppError("unknown-container", {}, path);
  return container.tareMilligrams;
}
