/** One bag split into piles and rejects: one act in the ledger, whole or not at all. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { moveBagIn } from "@/lib/bags/commands/move-bag";
import { getBagByCode, type Bag } from "@/lib/bags/queries";
import { formatCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { SortingId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import { undoUntil } from "@/lib/core/undo";
import { ensureHolder } from "@/lib/ledger/commands/define";
import { postAct, type Draft } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { REJECT, UNSORTED, type Basis } from "@/lib/ledger/terms";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { basisOf, requireScale } from "@/lib/scales/queries/instruments";
import type { Scale } from "@/lib/scales/queries/scales";
import { lotForMaterialIn, type OpenLot } from "@/lib/stock/commands/lots";
import type { CloseSortingInput, SortingReceipt } from "../contract";
import { getWeighedBag, listLoads, type WeighedBag } from "../queries/table";
import { judgeSum, sortedAt, toleranceOf, type SumVerdict } from "../rules";
import { CLOSE_SORTING_ADDRESS, REJECT_BIN_CODE } from "../terms";
import { readFractions, type Fraction } from "./fractions";

type Target = OpenLot & { materialId: number; grams: number; mpeMilligrams: number };

/**
 * Splits a bag: the bag's net leaves it, piles go to their lots (opened where none is open), rejects to the
 * bin, and what is over or missing is posted as difference, or as loss of the named cause.
 *
 * @throws AppError `unknown-code`, `bag-not-weighed`, `bag-already-sorted`, `unknown-scale`, `piles-empty`,
 *   `sum-beyond-tolerance` (name a cause or weigh again), `sum-far-above-net` (weigh again, then confirm),
 *   and what {@link readFractions} refuses
 */
export function closeSorting(ctx: Context, input: CloseSortingInput): SortingReceipt {
  allow(ctx, "sorting.record");
  const doneBy = requirePerson(ctx);
  return once<SortingReceipt>(
    ctx,
    `${CLOSE_SORTING_ADDRESS.method} ${CLOSE_SORTING_ADDRESS.path}`,
    input.requestId,
    (tx) => {
      const { bag, weighed } = requireWeighed(tx, input);
      const scale = requireScale(tx, input.scaleId, input.occurredAt);
      const fractions = readFractions(tx, input, scale);
      if (fractions.length === 0) throw new AppError("piles-empty");

      const netGrams = heldBy(tx, weighed.holderId, UNSORTED);
      const tolerance = toleranceOf([
        ...listLoads(tx, weighed),
        ...fractions.flatMap((fraction) => fraction.loads),
      ]);
      const sumGrams = fractions.reduce((sum, fraction) => sum + fraction.netGrams, 0);
      const verdict = requireExplained(judgeSum(netGrams, sumGrams, tolerance, input), {
        netGrams,
        sumGrams,
        tolerance,
      });

      const sortingId = input.requestId as SortingId;
      const occurredAt = sortedAt(input.occurredAt, weighed.occurredAt, ctx.now);
      const targets = findTargets(tx, ctx, fractions);
      const read = { basis: basisOf(tx, scale.id, occurredAt), scaleNumber: scale.number };
      const { actId } = postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, [
        {
          kind: "sort",
          occurredAt,
          subject: `sorting:${sortingId}`,
          lines: linesOf(tx, weighed, netGrams, targets, fractions, read, verdict),
        },
      ]);
      const cause = verdict.kind === "loss" ? verdict.cause : null;
      prepared(
        tx.client,
        `insert into sorting_sessions (id, state, done_by, occurred_at, recorded_at, net_grams,
           difference_grams, tolerance_mg, cause, act_id) values (?, 'closed', ?, ?, ?, ?, ?, ?, ?, ?)`,
      ).run(
        sortingId,
        doneBy,
        occurredAt,
        ctx.now,
        netGrams,
        verdict.differenceGrams,
        tolerance,
        cause,
        actId,
      );
      prepared(
        tx.client,
        "insert into sorting_bags (session_id, bag_id, live) values (?, ?, 1)",
      ).run(sortingId, bag.id);
      insertFractions(tx, sortingId, fractions, targets, scale);
      moveBagIn(tx, bag.id, "sorted", ctx.now);

      const rejectedGrams = sumOf(fractions.filter((one) => one.rejectReason !== null));
      const receipt: SortingReceipt = {
        sortingId,
        code: bag.code,
        netGrams,
        acceptedGrams: sumGrams - rejectedGrams,
        rejectedGrams,
        differenceGrams: verdict.differenceGrams,
        cause,
        lots: targets.map(({ number, opened, grams, holderId, materialId }) => ({
          number,
          opened,
          grams,
          heldGrams: heldBy(tx, holderId, materialId),
        })),
        recordedAt: ctx.now,
        undoUntil: undoUntil(ctx.now),
      };
      recordAudit(tx, ctx, {
        action: "sorting.close",
        subjectKind: "sorting",
        subjectId: sortingId,
        fields: {
          bagId: bag.id,
          netGrams,
          acceptedGrams: receipt.acceptedGrams,
          rejectedGrams,
          differenceGrams: verdict.differenceGrams,
          cause,
          judged: verdict.kind,
          lotsOpened: targets
            .filter((target) => target.opened)
            .map((target) => target.number)
            .join(" "),
        },
        actId,
      });
      return receipt;
    },
  );
}

function requireWeighed(tx: Tx, input: CloseSortingInput): { bag: Bag; weighed: WeighedBag } {
  const bag = getBagByCode(tx, input.code);
  const code = formatCode(input.code);
  if (!bag) throw new AppError("unknown-code", { code }, ["code"]);
  if (bag.state === "sorted" || bag.state === "closed") {
    throw new AppError("bag-already-sorted", { code }, ["code"]);
  }
  const weighed = bag.state === "weighed" ? getWeighedBag(tx, bag.id, bag.code) : null;
  if (!weighed) throw new AppError("bag-not-weighed", { code }, ["code"]);
  return { bag, weighed };
}

type Explained = Extract<SumVerdict, { kind: "within" | "loss" | "surplus" }>;

function requireExplained(
  verdict: SumVerdict,
  of: { netGrams: number; sumGrams: number; tolerance: number },
): Explained {
  if (verdict.kind !== "needs-cause" && verdict.kind !== "needs-check") return verdict;
  const values = {
    sumKg: formatKg(of.sumGrams),
    netKg: formatKg(of.netGrams),
    differenceKg: formatKg(Math.abs(verdict.differenceGrams)),
    toleranceKg: formatKg(Math.floor(of.tolerance / 1000)),
  };
  throw verdict.kind === "needs-cause"
    ? new AppError("sum-beyond-tolerance", values, ["cause"])
    : new AppError("sum-far-above-net", values, ["confirmedAbove"]);
}

const sumOf = (fractions: readonly Fraction[]): number =>
  fractions.reduce((sum, fraction) => sum + fraction.netGrams, 0);

/** Piles of one material go to one lot, however often they were put on the scale. */
function findTargets(tx: Tx, ctx: Context, fractions: readonly Fraction[]): Target[] {
  const targets = new Map<number, Target>();
  for (const { materialId, netGrams, mpeMilligrams } of fractions) {
    if (materialId === REJECT) continue;
    let target = targets.get(materialId);
    if (!target) {
      target = { ...lotForMaterialIn(tx, ctx, materialId), materialId, grams: 0, mpeMilligrams: 0 };
      targets.set(materialId, target);
    }
    target.grams += netGrams;
    target.mpeMilligrams += mpeMilligrams;
  }
  return [...targets.values()];
}

function linesOf(
  tx: Tx,
  weighed: WeighedBag,
  netGrams: number,
  targets: readonly Target[],
  fractions: readonly Fraction[],
  read: { basis: Basis; scaleNumber: number },
  verdict: Explained,
): Draft["lines"] {
  const rejects = fractions.filter((fraction) => fraction.rejectReason !== null);
  const lines: Draft["lines"][number][] = [
    { account: "bag", holderId: weighed.holderId, materialId: UNSORTED, grams: -netGrams },
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
  return lines;
}

function insertFractions(
  tx: Tx,
  sortingId: SortingId,
  fractions: readonly Fraction[],
  targets: readonly Target[],
  scale: Scale,
): void {
  const lots = new Map(targets.map((target) => [target.materialId, target.lotId]));
  const insert = prepared(
    tx.client,
    `insert into fractions (session_id, seq, lot_id, material_id, reject_reason, scale_id, gross_mg, tare_mg,
       net_grams) values (?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  fractions.forEach((fraction, at) => {
    insert.run(
      sortingId,
      at + 1,
      lots.get(fraction.materialId) ?? null,
      fraction.materialId,
      fraction.rejectReason,
      scale.id,
      fraction.grossMilligrams,
      fraction.tareMilligrams,
      fraction.netGrams,
    );
  });
}
