/** Exports run in a worker thread with a read-only connection of their own; here they are started. */
import "server-only";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot } from "@/lib/platform/database";
import { startWorker, streamFromWorker } from "@/lib/platform/worker";
import type { Instant, Period } from "@/lib/core/time";
import type { BalanceInput, MovementsInput } from "../contract";
import { exportQuery } from "../rules/csv-headers";
import type { Grouping } from "../terms";
import { describeBalance } from "./balance-csv";

/** What the worker (lib/cli/export-worker.ts) is told. */
export type ExportJob = { databaseFile: string; period: Period } & (
  { what: "balance"; by: Grouping[]; now: Instant } | { what: "movements" }
);

function run(job: ExportJob): ReadableStream<Uint8Array> {
  return streamFromWorker(startWorker("export-worker", job), `export-${job.what}`);
}

/** The mass balance as UTF-8 CSV. */
export function exportBalance(ctx: Context, input: BalanceInput): ReadableStream<Uint8Array> {
  allow(ctx, "reports.export");
  const { from, until, by } = input;
  return run({
    what: "balance",
    databaseFile: ctx.db.file,
    period: { from, until },
    by,
    now: ctx.now,
  });
}

/** Every ledger line of a period as UTF-8 CSV. */
export function exportMovements(ctx: Context, input: MovementsInput): ReadableStream<Uint8Array> {
  allow(ctx, "reports.export");
  const { from, until } = input;
  return run({ what: "movements", databaseFile: ctx.db.file, period: { from, until } });
}

/** The description that goes with the balance's file. */
export function getBalanceDescription(ctx: Context, input: BalanceInput): Record<string, unknown> {
  allow(ctx, "reports.export");
  const { from, until, by } = input;
  return inSnapshot<Record<string, unknown>>(ctx, (db) =>
    describeBalance(db, { from, until }, by, `balance.csv${exportQuery({ from, until }, by)}`),
  );
}
