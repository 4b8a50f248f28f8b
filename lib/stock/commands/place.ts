/** Where a lot stands. No mass moves, so the ledger is not asked. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { LotId } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { setLotPlaceEndpoint } from "../contract/lots";

/**
 * @throws AppError `not-found` when there is no lot of that number
 */
export function setLotPlace(
  ctx: Context,
  input: z.output<typeof setLotPlaceEndpoint.input>,
): z.output<typeof setLotPlaceEndpoint.output> {
  allow(ctx, "stock.edit");
  return once<z.output<typeof setLotPlaceEndpoint.output>>(
    ctx,
    "PUT /api/lots/{number}/place",
    input.requestId,
    (tx) => {
      const lot = prepared(tx.client, "select id, place from lots where number = ?").get(
        input.number,
      ) as { id: LotId; place: string } | undefined;
      if (!lot) throw new AppError("not-found");
      prepared(tx.client, "update lots set place = ? where id = ?").run(input.place, lot.id);
      recordAudit(tx, ctx, {
        action: "stock.place",
        subjectKind: "lot",
        subjectId: lot.id,
        fields: { number: input.number, before: lot.place, after: input.place },
      });
      return { number: input.number, place: input.place };
    },
  );
}
