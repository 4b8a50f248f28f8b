/** What closing and correcting a session share: the table judged, its entry's lines, its records. */
import "server-only";
import type { Bag } from "@/lib/bags/queries";
import { AppError } from "@/lib/core/errors";
import type { LotId, PersonId, SortingId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { ensureHolder } from "@/lib/ledger/commands/define";
import type { Draft } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { REJECT, UNSORTED, type Basis } from "@/lib/ledger/terms";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { basisOf, requireScale } from "@/lib/scales/queries/instruments";
import type { Scale } from "@/lib/scales/queries/scales";
import { toleranceOf } from "@/lib/scales/rules/loads";
import { chosenLotIn, lotForMaterialIn, openLotIn, type OpenLot } from "@/lib/stock/commands/lots";
import type { SortingReceipt, TableInput } from "../contract/sortings";
import { listLoads, type WeighedBag } from "../queries/table";
import { judgeSum, sortedAt, type SumVerdict } from "../rules/table";
import { REJECT_BIN_CODE } from "../terms";
import { readFractions, type Fraction } from "./fractions";

/** A bag on the table, with what its piles are made of: what the book holds for it, in grams. */
export type TippedBag = { bag: Bag; weighed: WeighedBag; grams: number };

type Target = OpenLot & { materialId: number; grams: number; mpeMilligrams: number };
type Explained = Extract<SumVerdict, { kind: "within" | "loss" | "surplus" }>;

/** A table that passed the rules; nothing of it is written yet but the lots that it opens. */
export type JudgedTable = {
  bags: readonly TippedBag[];
  scale: Scale;
  fractions: readonly Fraction[];
  targets: readonly Target[];
  /** Of each fraction, in order; null for a reject. */
  targetOf: readonly (Target | null)[];
  netGrams: number;
  sumGrams: number;
  tolerance: number;
  verdict: Explained;
  occurredAt: Instant;
};

/**
 * Reads and judges what lies on the table.
 *
 * @param path of the table in the input
 * @param keeps lots of the session that is corrected: its piles lie there, also when they closed since
 * @throws AppError `unknown-scale`, `piles-empty`, `sum-beyond-tolerance` (name a cause or weigh again),
 *   `sum-far-above-net` (weigh again, then confirm), `lot-closed`, `lot-other-material`, and what
 *   {@link readFractions} refuses
 */
export function judgeTableIn(
  tx: Tx,
  ctx: Context,
  bags: readonly TippedBag[],
  input: TableInput,
  path: readonly (string | number)[] = [],
  keeps: ReadonlySet<LotId> = new Set(),
): JudgedTable {
  const scale = requireScale(tx, input.scaleId, input.occurredAt, [...path, "scaleId"]);
  const fractions = readFractions(tx, input, scale, path);
  if (fractions.length === 0) throw new AppError("piles-empty");
  const netGrams = bags.reduce((sum, { grams }) => sum + grams, 0);
  const tolerance = toleranceOf([
    ...bags.flatMap(({ weighed }) => listLoads(tx, weighed)),
    ...fractions.flatMap((fraction) => fraction.loads),
  ]);
  const sumGrams = sumOf(fractions);
  const verdict = requireExplained(
    judgeSum(netGrams, sumGrams, tolerance, input),
    { netGrams, sumGrams, tolerance },
    path,
  );
  // None of the bags can be sorted before it came.
  const lastWeighed = Math.max(...bags.map(({ weighed }) => weighed.occurredAt)) as Instant;
  const occurredAt = sortedAt(input.occurredAt, lastWeighed, ctx.now);
  const { targets, targetOf } = findTargets(tx, ctx, input, fractions, path, keeps);
  return {
    bags,
    scale,
    fractions,
    targets,
    targetOf,
    netGrams,
    sumGrams,
    tolerance,
    verdict,
    occurredAt,
  };
}

function requireExplained(
  verdict: SumVerdict,
  of: { netGrams: number; sumGrams: number; tolerance: number },
  path: readonly (string | number)[],
): Explained {
  if (verdict.kind !== "needs-cause" && verdict.kind !== "needs-check") return verdict;
  const values = {
    sumKg: formatKg(of.sumGrams),
    netKg: formatKg(of.netGrams),
    differenceKg: formatKg(Math.abs(verdict.differenceGrams)),
    toleranceKg: formatKg(Math.floor(of.tolerance / 1000)),
  };
  throw verdict.kind === "needs-cause"
    ? new AppError("sum-beyond-tolerance", values, [...path, "cause"])
    : new AppError("sum-far-above-net", values, [...path, "confirmedAbove"]);
}

const sumOf = (fractions: readonly Fraction[]): number =>
  fractions.reduce((sum, fraction) => sum + fraction.netGrams, 0);

/** Piles of one material that name no lot go to one lot, however often they were put on the scale. */
function findTargets(
  tx: Tx,
  ctx: Context,
  input: TableInput,
  fractions: readonly Fraction[],
  path: readonly (string | number)[],
  keeps: ReadonlySet<LotId>,
): Pick<JudgedTable, "targets" | "targetOf"> {
  const targets = new Map<string, Target>();
  const targetOf = fractions.map(({ materialId, netGrams, mpeMilligrams }, at): Target | null => {
    if (materialId === REJECT) return null;
    const wanted = input.piles[at]?.lot ?? null;
    const key = `${materialId}:${wanted ?? ""}`;
    let target = targets.get(key);
    if (!target) {
      const lot =
        wanted === null
          ? lotForMaterialIn(tx, ctx, materialId, keeps)
          : wanted === "new"
            ? openLotIn(tx, ctx, materialId)
            : chosenLotIn(tx, wanted, materialId, [...path, "piles", at, "lot"], keeps);
      // The one that is open by itself may also be the one that was chosen.
      const same = [...targets.values()].find(({ holderId }) => holderId === lot.holderId);
      target = same ?? { ...lot, materialId, grams: 0, mpeMilligrams: 0 };
      targets.set(key, target);
    }
    target.grams += netGrams;
    target.mpeMilligrams += mpeMilligrams;
    return target;
  });
  return { targets: [...new Set(targets.values())], targetOf };
}

/** The entry of a table: every bag's grams leave it, piles, rejects and what is over or missing come to them. */
export function sortDraft(tx: Tx, sortingId: SortingId, table: JudgedTable): Draft {
  const { bags, targets, fractions, scale, verdict, occurredAt } = table;
  const read: { basis: Basis; scaleNumber: number } = {
    basis: basisOf(tx, scale.id, occurredAt),
    scaleNumber: scale.number,
  };
  const rejects = fractions.filter((fraction) => fraction.rejectReason !== null);
  const lines: Draft["lines"][number][] = [
    ...bags.map(({ weighed, grams }) => ({
      account: "bag" as const,
      holderId: weighed.holderId,
      materialId: UNSORTED,
      grams: -grams,
    })),
    ...targets.map(({ holderId, materialId, grams, mpeMilligrams }) => ({
      account: "lot" as const,
      holderId,
      materialId,
      grams,
      mpeMilligrams,
      ...read,
    })),
  ];
  if (rejects.length > 0) {
    lines.push({
      account: "reject-bin",
      holderId: ensureHolder(tx, "reject-bin", REJECT_BIN_CODE),
      materialId: REJECT,
      grams: sumOf(rejects),
      mpeMilligrams: rejects.reduce((sum, reject) => sum + reject.mpeMilligrams, 0),
      ...read,
    });
  }
  if (verdict.differenceGrams !== 0) {
    lines.push(
      verdict.kind === "loss"
        ? { account: "loss", cause: verdict.cause, grams: verdict.differenceGrams }
        : { account: "difference", grams: verdict.differenceGrams },
    );
  }
  return { kind: "sort", occurredAt, subject: `sorting:${sortingId}`, lines };
}

/** Writes the session with its bags and fractions. */
export function insertSession(
  tx: Tx,
  ctx: Context,
  of: {
    sortingId: SortingId;
    doneBy: PersonId;
    actId: number;
    corrects: SortingId | null;
    table: JudgedTable;
  },
): SortingReceipt {
  const { sortingId, table } = of;
  const { verdict, fractions } = table;
  const cause = verdict.kind === "loss" ? verdict.cause : null;
  prepared(
    tx.client,
    `insert into sorting_sessions (id, state, done_by, occurred_at, recorded_at, net_grams,
       difference_grams, tolerance_mg, cause, act_id, corrects) values (?, 'closed', ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    sortingId,
    of.doneBy,
    table.occurredAt,
    ctx.now,
    table.netGrams,
    verdict.differenceGrams,
    table.tolerance,
    cause,
    of.actId,
    of.corrects,
  );
  const addBag = prepared(
    tx.client,
    "insert into sorting_bags (session_id, bag_id, live) values (?, ?, 1)",
  );
  for (const { bag } of table.bags) addBag.run(sortingId, bag.id);
  insertFractions(tx, sortingId, table);
  const rejectedGrams = sumOf(fractions.filter((one) => one.rejectReason !== null));
  return {
    sortingId,
    codes: table.bags.map(({ bag }) => bag.code),
    netGrams: table.netGrams,
    acceptedGrams: table.sumGrams - rejectedGrams,
    rejectedGrams,
    differenceGrams: verdict.differenceGrams,
    cause,
    lots: table.targets.map(({ number, opened, grams, holderId, materialId }) => ({
      number,
      opened,
      grams,
      heldGrams: heldBy(tx, holderId, materialId),
    })),
    recordedAt: ctx.now,
    undoUntil: undoUntil(ctx.now),
  };
}

function insertFractions(tx: Tx, sortingId: SortingId, table: JudgedTable): void {
  const insert = prepared(
    tx.client,
    `insert into fractions (session_id, seq, lot_id, material_id, reject_reason, scale_id, gross_mg, tare_mg,
       net_grams) values (?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  table.fractions.forEach((fraction, at) => {
    insert.run(
      sortingId,
      at + 1,
      table.targetOf[at]?.lotId ?? null,
      fraction.materialId,
      fraction.rejectReason,
      table.scale.id,
      fraction.grossMilligrams,
      fraction.tareMilligrams,
      fraction.netGrams,
    );
  });
}
