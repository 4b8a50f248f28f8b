import "server-only";
import type * as z from "zod";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import type { RejectReason, rejectReasonsEndpoint } from "../contract/sortings";

/** Reasons in use, in their order. */
export function listRejectReasons(
  ctx: Context,
  _input: z.output<typeof rejectReasonsEndpoint.input> = {},
): z.output<typeof rejectReasonsEndpoint.output> {
  allow(ctx, "sorting.record");
  const found = prepared(
    ctx.db.reader.client,
    "select code, name, warning from reject_reasons where retired_at is null order by position, code",
  ).all() as (Omit<RejectReason, "warning"> & { warning: number })[];
  return { items: found.map((reason) => ({ ...reason, warning: reason.warning === 1 })) };
}
