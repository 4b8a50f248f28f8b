/** Reading what a sorting sends: every pile and reject with its scale, tare, material or reason. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import { REJECT } from "@/lib/ledger/terms";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import { prepared, type Tx } from "@/lib/platform/database";
import { withListedTares } from "@/lib/scales/queries/instruments";
import type { Scale } from "@/lib/scales/queries/scales";
import { loadsOf, type Load } from "@/lib/scales/rules/loads";
import { mpeOf, netGramsOf, refuseReadings, tareMilligrams } from "@/lib/scales/rules/reading";
import type { TableInput } from "../contract/sortings";

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
export function readFractions(
  tx: Tx,
  input: TableInput,
  scale: Scale,
  tablePath: Path = [],
): Fraction[] {
  return [
    ...input.piles.map((pile, at) => {
      const path = [...tablePath, "piles", at];
      requireListed(tx, "colours", pile.colourCode, "unknown-colour", [...path, "colourCode"]);
      const { reading, lot: _lot, ...material } = pile;
      return {
        ...weigh(tx, reading, scale, input.occurredAt, [...path, "reading"]),
        materialId: ensureMaterial(tx, material),
        rejectReason: null,
      };
    }),
    ...input.rejects.map((reject, at) => {
      const path = [...tablePath, "rejects", at];
      requireListed(tx, "reject_reasons", reject.reason, "unknown-reason", [...path, "reason"]);
      return {
        ...weigh(tx, reject.reading, scale, input.occurredAt, [...path, "reading"]),
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
  occurredAt: Instant,
  path: Path,
): Omit<Fraction, "materialId" | "rejectReason"> {
  const { reading } = withListedTares(tx, sent, occurredAt, path);
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
