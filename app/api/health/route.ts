import { AppError } from "@/lib/core/errors";
import { healthEndpoint } from "@/lib/http/own-endpoints";
import { route } from "@/lib/http/route";
import { ledgerHead } from "@/lib/ledger/queries/entries";
import { log } from "@/lib/platform/logger";

export const GET = route(healthEndpoint, (ctx) => {
  try {
    const { entryId, hash } = ledgerHead(ctx.db.reader);
    return { status: "ok" as const, ledger: { entryId, hash } };
  } catch (error) {
    log.error("health", error, { requestId: ctx.requestId });
    throw new AppError("database-unavailable");
  }
});
