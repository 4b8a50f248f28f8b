/** What a weigh-in posts, first saved or corrected: into the bag, and for a bag of one kind on into its lot. */
import "server-only";
import type { LabelCode } from "@/lib/core/bag-code";
import type { LotId, PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import type { Draft } from "@/lib/ledger/commands/post";
import { UNSORTED, type Basis } from "@/lib/ledger/terms";
import type { Context } from "@/lib/platform/context";
import type { Tx } from "@/lib/platform/database";
import { lotForMaterialIn, type OpenLot } from "@/lib/stock/commands/lots";
import type { materialOf } from "../rules";

export type Weighed = {
  weighInId: string;
  code: LabelCode;
  pointId: PointId;
  occurredAt: Instant;
  netGrams: number;
  mpeMilligrams: number;
  basis: Basis;
  scaleNumber: number;
};

export type WeighedDrafts = {
  drafts: Draft[];
  /** Of a bag of one kind; opened where none was open. */
  lot: (OpenLot & { materialId: number }) | null;
};

/**
 * @param material of a bag of one kind; null for a bag that waits for sorting
 * @param keeps the lot of the weigh-in that is corrected: the bag lies there, also when it closed since
 */
export function weighInDrafts(
  tx: Tx,
  ctx: Context,
  weighed: Weighed,
  material: ReturnType<typeof materialOf>,
  keeps: LotId | null = null,
): WeighedDrafts {
  const { code, pointId, occurredAt, netGrams, mpeMilligrams, basis, scaleNumber } = weighed;
  const subject = `weigh-in:${weighed.weighInId}`;
  const reading = { basis, scaleNumber, mpeMilligrams };
  const holderId = ensureHolder(tx, "bag", code);
  const drafts: Draft[] = [
    {
      kind: "weigh-in",
      occurredAt,
      subject,
      lines: [
        {
          account: "source",
          originNo: ensureOrigin(tx, "donated", pointId),
          materialId: UNSORTED,
          grams: -netGrams,
          ...reading,
        },
        { account: "bag", holderId, materialId: UNSORTED, grams: netGrams },
      ],
    },
  ];
  if (!material) return { drafts, lot: null };
  const materialId = ensureMaterial(tx, { ...material, form: "whole", wash: "as-received" });
  const lot = {
    ...lotForMaterialIn(tx, ctx, materialId, new Set(keeps === null ? [] : [keeps])),
    materialId,
  };
  drafts.push({
    kind: "sort",
    occurredAt,
    subject,
    lines: [
      { account: "bag", holderId, materialId: UNSORTED, grams: -netGrams },
      { account: "lot", holderId: lot.holderId, materialId, grams: netGrams, ...reading },
    ],
  });
  return { drafts, lot };
}
