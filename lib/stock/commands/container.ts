/** Which listed container a lot lies in. No mass moves, so the ledger is not asked. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { getContainer } from "@/lib/scales/queries/scales";
import type { setLotContainerEndpoint } from "../contract/lot-care";
import { requireLot } from "../queries/lot-record";

/**
 * @throws AppError `not-found`, `unknown-container` (also for a sack or a retired one), `container-taken` when another
 *   open lot lies in it
 */
export function setLotContainer(
  ctx: Context,
  input: z.output<typeof setLotContainerEndpoint.input>,
): z.output<typeof setLotContainerEndpoint.output> {
  allow(ctx, "stock.edit");
  return once<z.output<typeof setLotContainerEndpoint.output>>(
    ctx,
    `PUT /api/lots/${input.number}/container`,
    input.requestId,
    (tx) => {
      const lot = requireLot(tx, input.number);
      const container = input.containerId === null ? null : getContainer(tx, input.containerId);
      if (
        input.containerId !== null &&
        (container?.kind !== "container" || container.retiredAt !== null)
      ) {
        throw new AppError("unknown-container", {}, ["containerId"]);
      }
      const other = prepared(
        tx.client,
        "select number from lots where container_id = ? and closed_at is null and id <> ? limit 1",
      )
        .pluck()
        .get(input.containerId, lot.lotId) as number | undefined;
      if (container && other !== undefined) {
        throw new AppError("container-taken", { name: container.name, number: other }, [
          "containerId",
        ]);
      }
      prepared(tx.client, "update lots set container_id = ? where id = ?").run(
        input.containerId,
        lot.lotId,
      );
      recordAudit(tx, ctx, {
        action: "stock.container",
        subjectKind: "lot",
        subjectId: lot.lotId,
        fields: {
          number: lot.number,
          containerId: input.containerId,
          containerBefore: lot.containerId,
        },
      });
      return {
        number: lot.number,
        containerId: input.containerId,
        containerName: container?.name ?? null,
      };
    },
  );
}
