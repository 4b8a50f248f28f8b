/**
 * The thread in which an export is made: its own read-only connection, one piece for each "more", so that
 * it never runs ahead of whoever reads it.
 */
import { parentPort, workerData } from "node:worker_threads";
import { openConnection } from "@/db/client";
import type { Piece } from "@/lib/platform/worker";
import { balanceCsv } from "@/lib/reports/queries/balance-csv";
import type { ExportJob } from "@/lib/reports/queries/exports";
import { movementsCsv } from "@/lib/reports/queries/movements-csv";

const { job } = workerData as { job: ExportJob };
const port = parentPort;
if (!port) throw new Error("This file is a worker; lib/platform/worker.ts starts it.");

const db = openConnection(job.databaseFile, "reader");
// It reads every page once, in order: a large cache would only hold what is not asked for again.
db.client.pragma("cache_size = -2000");
const pieces =
  job.what === "balance"
    ? balanceCsv(db, job.period, job.by, job.now)
    : movementsCsv(db, job.period);
const utf8 = new TextEncoder();

function nextPiece(): Piece {
  try {
    const next = pieces.next();
    return next.done ? { end: true } : { piece: utf8.encode(next.value) };
  } catch (error) {
    return { failed: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}

port.on("message", () => {
  const answer = nextPiece();
  if ("piece" in answer) {
    port.postMessage(answer, [answer.piece.buffer as ArrayBuffer]);
    return;
  }
  db.client.close();
  port.postMessage(answer);
  port.close();
});
