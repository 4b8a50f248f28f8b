/** What every command on a plan asks first. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { prepared, type Tx } from "@/lib/platform/database";

/** The run while it is a plan. @throws AppError `not-found`, `run-not-planned` */
export function requirePlanned(tx: Tx, id: Id<"run">): { id: Id<"run">; number: number } {
  const run = prepared(tx.client, "select id, number, state from runs where id = ?").get(id) as
    { id: Id<"run">; number: number; state: string } | undefined;
  if (!run) throw new AppError("not-found");
  if (run.state !== "planned") throw new AppError("run-not-planned", { number: run.number });
  return run;
}
