/** The thread in which the server verifies the ledger: its own read-only connection, one answer. */
import { parentPort, workerData } from "node:worker_threads";
import { openConnection } from "@/db/client";
import type { VerifyJob } from "@/lib/ledger/commands/verify";
import { verifyLedger } from "@/lib/ledger/queries/verify";

const { job } = workerData as { job: VerifyJob };
const connection = openConnection(job.databaseFile, "reader");
parentPort?.postMessage(verifyLedger(connection, job.expected ?? undefined));
connection.client.close();
