/** Removals and receipts as their commands read them back. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { listActEntries, loadLines, reversalOf } from "@/lib/ledger/queries/entries";
import type { Line } from "@/lib/ledger/rules/split";
import { REJECT } from "@/lib/ledger/terms";
import { prepared, type Readable } from "@/lib/platform/database";
import { REJECT_BIN_CODE } from "@/lib/sorting/terms";
import type { RecordState } from "@/lib/stock/terms";
import type { Place } from "../rules";
import type { RemovalSource, Route } from "../terms";

export type StoredRemoval = {
  id: Id<"removal">;
  source: RemovalSource;
  route: Route;
  destinationId: Id<"destination">;
  receiverName: string;
  grams: number;
  doneBy: string;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
  corrects: Id<"removal"> | null;
  actId: number;
};

export type StoredReceipt = {
  id: Id<"removal-receipt">;
  removalId: Id<"removal">;
  number: string;
  receivedGrams: number;
  doneBy: string;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
  actId: number;
};

export function getStoredRemoval(db: Readable, id: Id<"removal">): StoredRemoval | null {
  const row = prepared(
    db.client,
    `select id, source, route, destination_id as destinationId, receiver_name as receiverName, grams,
            done_by as doneBy, occurred_at as occurredAt, recorded_at as recordedAt, state, corrects, act_id as actId
       from removals where id = ?`,
  ).get(id);
  return (row as StoredRemoval | undefined) ?? null;
}

const RECEIPT = `r.id, r.removal_id as removalId, r.number, r.received_grams as receivedGrams, r.done_by as doneBy,
  r.occurred_at as occurredAt, r.recorded_at as recordedAt, r.state, r.act_id as actId`;

export function getStoredReceipt(db: Readable, id: Id<"removal-receipt">): StoredReceipt | null {
  const row = prepared(db.client, `select ${RECEIPT} from removal_receipts r where r.id = ?`).get(
    id,
  );
  return (row as StoredReceipt | undefined) ?? null;
}

/** The receipt that proves a removal now; null while it is unproven. */
export function getLiveReceipt(db: Readable, removalId: Id<"removal">): StoredReceipt | null {
  const row = prepared(
    db.client,
    `select ${RECEIPT} from removal_receipts r where r.removal_id = ? and r.state = 'posted'`,
  ).get(removalId);
  return (row as StoredReceipt | undefined) ?? null;
}

/** A live receipt of the same receiver with the same number, for another removal. */
export function getReceiptByNumber(
  db: Readable,
  receiverName: string,
  number: string,
): (StoredReceipt & { removedAt: Instant }) | null {
  const row = prepared(
    db.client,
    `select ${RECEIPT}, m.occurred_at as removedAt
       from removal_receipts r join removals m on m.id = r.removal_id
      where r.state = 'posted' and lower(r.number) = lower(?) and m.receiver_name = ?`,
  ).get(number, receiverName);
  return (row as (StoredReceipt & { removedAt: Instant }) | undefined) ?? null;
}

/** The reject bin as a place of the ledger; null while nothing was ever turned away. */
export function findRejectBin(db: Readable): Place | null {
  const holderId = prepared(db.client, "select id from holders where code = ?")
    .pluck()
    .get(REJECT_BIN_CODE) as number | undefined;
  return holderId === undefined ? null : { account: "reject-bin", holderId, materialId: REJECT };
}

/** Lines of an act's entries that still stand, without those that only took something back. */
export function listStandingLines(db: Readable, actId: number): Line[] {
  return listActEntries(db, actId)
    .filter(({ id, kind }) => kind !== "reversal" && reversalOf(db, id) === null)
    .flatMap(({ id }) => loadLines(db, id));
}

/** What a removal passed on, unproven, with its parts: what a receipt proves. */
export function listPassedOn(db: Readable, actId: number): Line[] {
  return listActEntries(db, actId)
    .filter(({ kind }) => kind === "removal")
    .flatMap(({ id }) => loadLines(db, id))
    .filter(({ account, grams }) => account === "passed-on" && grams > 0);
}
