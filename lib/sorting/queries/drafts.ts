/** Sessions under way. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { BagId, SortingId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { listDraftsEndpoint, SortingDraft } from "../contract/drafts";
import { isPresent, PRESENT_MS } from "../rules/drafts";
import type { DRAFT_STATES } from "../terms";

type Row = Omit<SortingDraft, "codes" | "changedBy" | "others"> & {
  state: (typeof DRAFT_STATES)[number];
  startedBy: string;
  changedBy: string;
  changedName: string;
  startedName: string;
};

const DRAFT = `d.id, d.version, d.content, d.started_at as startedAt, d.changed_at as changedAt, d.state,
  d.started_by as startedBy, d.changed_by as changedBy, c.name as changedName, s.name as startedName
  from sorting_drafts d join people c on c.id = d.changed_by join people s on s.id = d.started_by`;

/** The open draft that has this bag on its table, and who changed it last. */
export function draftOf(db: Readable, bagId: BagId): { id: SortingId; who: string } | null {
  return (
    (prepared(
      db.client,
      `select d.id, p.name as who from sorting_draft_bags b
         join sorting_drafts d on d.id = b.draft_id join people p on p.id = d.changed_by
        where b.bag_id = ? and b.live = 1 and d.state = 'open'`,
    ).get(bagId) as { id: SortingId; who: string } | undefined) ?? null
  );
}

/** The same, of another session than this one. */
export function otherDraftOf(
  db: Readable,
  bagId: BagId,
  own: SortingId,
): { id: SortingId; who: string } | null {
  const draft = draftOf(db, bagId);
  return draft?.id === own ? null : draft;
}

function codesOf(db: Readable, draftId: string): string[] {
  return prepared(
    db.client,
    `select b.code from sorting_draft_bags db join bags b on b.id = db.bag_id
      where db.draft_id = ? and db.live = 1 order by b.code`,
  )
    .pluck()
    .all(draftId) as string[];
}

function othersOf(
  db: Readable,
  draftId: string,
  reader: string,
  now: Instant,
): SortingDraft["others"] {
  const seen = prepared(
    db.client,
    `select p.id, p.name, s.seen_at as seenAt from sorting_presence s join people p on p.id = s.person_id
      where s.draft_id = ? and s.person_id <> ? and s.seen_at >= ? order by p.name`,
  ).all(draftId, reader, now - PRESENT_MS) as { id: string; name: string; seenAt: number }[];
  return seen.filter(({ seenAt }) => isPresent(seenAt, now)).map(({ id, name }) => ({ id, name }));
}

/**
 * One draft as its page shows it.
 *
 * @throws AppError `not-found`, `draft-over` when it was saved or given up
 */
export function readDraft(
  db: Readable,
  draftId: SortingId,
  reader: string,
  now: Instant,
): SortingDraft {
  const row = prepared(db.client, `select ${DRAFT} where d.id = ?`).get(draftId) as Row | undefined;
  if (!row) throw new AppError("not-found");
  if (row.state !== "open") throw new AppError("draft-over", { state: row.state });
  const { id, version, content, startedAt, changedAt } = row;
  return {
    id,
    version,
    content,
    startedAt,
    changedAt,
    codes: codesOf(db, id),
    changedBy: { id: row.changedBy, name: row.changedName },
    others: othersOf(db, id, reader, now),
  };
}

/** Last changed first. */
export function listDrafts(
  ctx: Context,
  _input: z.output<typeof listDraftsEndpoint.input> = {},
): z.output<typeof listDraftsEndpoint.output> {
  allow(ctx, "sorting.record");
  const reader = ctx.actor.kind === "person" ? ctx.actor.id : "";
  return inSnapshot(ctx, (db) => {
    const rows = prepared(
      db.client,
      `select ${DRAFT} where d.state = 'open' order by d.changed_at desc, d.id limit 100`,
    ).all() as Row[];
    const grams = prepared(
      db.client,
      `select coalesce(sum(bal.grams), 0) from sorting_draft_bags db
         join bags b on b.id = db.bag_id join holders h on h.code = b.code
         join balances bal on bal.holder_id = h.id and bal.material_id = ${UNSORTED}
        where db.draft_id = ? and db.live = 1`,
    ).pluck();
    return {
      drafts: rows.map((row) => ({
        id: row.id,
        version: row.version,
        startedAt: row.startedAt,
        changedAt: row.changedAt,
        codes: codesOf(db, row.id),
        netGrams: grams.get(row.id) as number,
        startedBy: { id: row.startedBy, name: row.startedName },
        changedBy: { id: row.changedBy, name: row.changedName },
        others: othersOf(db, row.id, reader, ctx.now),
      })),
    };
  });
}
