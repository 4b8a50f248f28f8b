/** Sessions under way. Nothing here moves mass. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { getBagByCode } from "@/lib/bags/queries";
import { formatCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { PersonId, SortingId } from "@/lib/core/ids";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Tx } from "@/lib/platform/database";
import type {
  openDraftEndpoint,
  giveUpDraftEndpoint,
  SaveDraftInput,
  SortingDraft,
} from "../contract/drafts";
import { otherDraftOf, readDraft } from "../queries/drafts";
import type { DRAFT_STATES } from "../terms";

type Stored = {
  state: (typeof DRAFT_STATES)[number];
  version: number;
  content: string;
  changedBy: PersonId;
  who: string;
};

/**
 * Keeps what was typed, on top of the version that the page had. There is no request id: a version that was
 * written already with the same content is answered as it was.
 *
 * @throws AppError `draft-overtaken` when somebody else changed it since, `draft-over`, `unknown-code`, `bag-not-weighed`,
 *   `bag-already-sorted`, `bag-in-other-session`
 */
export function saveDraft(ctx: Context, input: SaveDraftInput): SortingDraft {
  allow(ctx, "sorting.record");
  const person = requirePerson(ctx);
  return inTransaction<SortingDraft>(ctx, (tx) => {
    const stored = findStored(tx, input.id);
    if (stored && stored.state !== "open") throw new AppError("draft-over");
    const version = stored?.version ?? 0;
    const again =
      stored?.version === input.version + 1 &&
      stored.changedBy === person &&
      stored.content === input.content;
    if (!again) {
      if (version !== input.version)
        throw new AppError("draft-overtaken", { who: stored?.who ?? "" });
      write(tx, ctx, person, input);
    }
    markPresent(tx, ctx, person, input.id);
    return readDraft(tx, input.id, person, ctx.now);
  });
}

/** A draft, and that whoever asks has it open: it marks presence, so it is a command. */
export function openDraft(
  ctx: Context,
  input: z.output<typeof openDraftEndpoint.input>,
): SortingDraft {
  allow(ctx, "sorting.record");
  const person = requirePerson(ctx);
  return inTransaction<SortingDraft>(ctx, (tx) => {
    const draft = readDraft(tx, input.id, person, ctx.now);
    markPresent(tx, ctx, person, input.id);
    return draft;
  });
}

/** Gives a draft up. @throws AppError `not-found`, `draft-over`, `draft-overtaken` */
export function giveUpDraft(
  ctx: Context,
  input: z.output<typeof giveUpDraftEndpoint.input>,
): z.output<typeof giveUpDraftEndpoint.output> {
  allow(ctx, "sorting.record");
  return inTransaction<{ id: string }>(ctx, (tx) => {
    const stored = findStored(tx, input.id);
    if (!stored) throw new AppError("not-found");
    if (stored.state === "saved") throw new AppError("draft-over");
    if (stored.state === "given-up") return { id: input.id };
    if (stored.version !== input.version)
      throw new AppError("draft-overtaken", { who: stored.who });
    prepared(tx.client, "update sorting_drafts set state = 'given-up' where id = ?").run(input.id);
    prepared(tx.client, "update sorting_draft_bags set live = 0 where draft_id = ?").run(input.id);
    recordAudit(tx, ctx, {
      action: "sorting.give-up",
      subjectKind: "sorting",
      subjectId: input.id,
      fields: { version: stored.version },
    });
    return { id: input.id };
  });
}

function findStored(tx: Tx, id: SortingId): Stored | null {
  return (
    (prepared(
      tx.client,
      `select d.state, d.version, d.content, d.changed_by as changedBy, p.name as who
         from sorting_drafts d join people p on p.id = d.changed_by where d.id = ?`,
    ).get(id) as Stored | undefined) ?? null
  );
}

function write(tx: Tx, ctx: Context, person: PersonId, input: SaveDraftInput): void {
  prepared(
    tx.client,
    `insert into sorting_drafts (id, state, started_by, started_at, changed_by, changed_at, version, content)
     values (@id, 'open', @person, @now, @person, @now, 1, @content)
     on conflict do update set changed_by = @person, changed_at = @now, version = version + 1, content = @content`,
  ).run({ id: input.id, person, now: ctx.now, content: input.content });
  prepared(tx.client, "update sorting_draft_bags set live = 0 where draft_id = ?").run(input.id);
  const put = prepared(
    tx.client,
    `insert into sorting_draft_bags (draft_id, bag_id, live) values (?, ?, 1)
     on conflict do update set live = 1`,
  );
  for (const [at, wanted] of input.codes.entries()) {
    const code = formatCode(wanted);
    const path = ["codes", at];
    const bag = getBagByCode(tx, wanted);
    if (!bag) throw new AppError("unknown-code", { code }, path);
    if (bag.state === "sorted" || bag.state === "closed") {
      throw new AppError("bag-already-sorted", { code }, path);
    }
    if (bag.state !== "weighed") throw new AppError("bag-not-weighed", { code }, path);
    const other = otherDraftOf(tx, bag.id, input.id);
    if (other) throw new AppError("bag-in-other-session", { code, who: other.who }, path);
    put.run(input.id, bag.id);
  }
}

function markPresent(tx: Tx, ctx: Context, person: PersonId, id: SortingId): void {
  prepared(
    tx.client,
    `insert into sorting_presence (draft_id, person_id, seen_at) values (?, ?, ?)
     on conflict do update set seen_at = excluded.seen_at`,
  ).run(id, person, ctx.now);
}
