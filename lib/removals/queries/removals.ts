/** Removals as the pages show them. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import type { Basis } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared } from "@/lib/platform/database";
import type { RecordState } from "@/lib/stock/terms";
import type { RemovalSource, Route } from "../terms";

export type RemovalSummary = {
  id: Id<"removal">;
  source: RemovalSource;
  route: Route;
  receiverName: string;
  noteNumber: string;
  grams: number;
  differenceGrams: number;
  basis: Basis;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
  /** The receipt that proves it now. */
  receiptNumber: string | null;
};

export type RemovalsPage = {
  removals: RemovalSummary[];
  /** For the next page; null on the last. */
  next: string | null;
  /** Passed on, and no receipt yet. */
  unproven: { count: number; grams: number };
};

const PAGE = 50;

const SUMMARY = `m.id, m.source, m.route, m.receiver_name as receiverName, m.note_number as noteNumber, m.grams,
  m.difference_grams as differenceGrams, m.basis, m.occurred_at as occurredAt, m.recorded_at as recordedAt, m.state,
  (select r.number from removal_receipts r where r.removal_id = m.id and r.state = 'posted') as receiptNumber`;

function readCursor(after: string | undefined): { at: number; id: string } {
  const [at = "", id = ""] = (after ?? "").split("_", 2);
  return /^\d{1,15}$/.test(at) ? { at: Number(at), id } : { at: Number.MAX_SAFE_INTEGER, id: "" };
}

/** Newest record first, a page at a time; what was taken back stays in the list and says so. */
export function listRemovals(ctx: Context, after: string | undefined): RemovalsPage {
  allow(ctx, "removals.read");
  return inSnapshot<RemovalsPage>(ctx, (db) => {
    const found = prepared(
      db.client,
      `select ${SUMMARY} from removals m
        where m.recorded_at <= @at and (m.recorded_at < @at or m.id < @id)
        order by m.recorded_at desc, m.id desc limit ${PAGE + 1}`,
    ).all(readCursor(after)) as RemovalSummary[];
    const unproven = prepared(
      db.client,
      `select count(*) as count, coalesce(sum(m.grams), 0) as grams from removals m
        where m.state = 'posted' and m.route = 'passed-on' and not exists (
          select 1 from removal_receipts r where r.removal_id = m.id and r.state = 'posted')`,
    ).get() as RemovalsPage["unproven"];
    const removals = found.slice(0, PAGE);
    const last = removals.at(-1);
    return {
      removals,
      next: found.length > PAGE && last ? `${last.recordedAt}_${last.id}` : null,
      unproven,
    };
  });
}
