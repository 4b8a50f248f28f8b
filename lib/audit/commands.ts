/** One row for every command: who did what to which record, in the command's own transaction. */
import "server-only";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";

/** Values of an audit row that name nobody. */
export type AuditFields = Readonly<Record<string, string | number | boolean | null>>;

export type AuditRecord = {
  /** The permission's form, "people.invite": area and verb. */
  action: string;
  /** "person", "weigh-in" */
  subjectKind: string;
  subjectId: string;
  /** Never names, addresses, mails or free text: those go into `personal`. */
  fields: AuditFields;
  /** Stands in a table of its own, so that erasing a person empties it and keeps the row. */
  personal?: Readonly<Record<string, string | null>>;
  actId?: number | null;
};

/** Writes the audit row of a command. The actor is null for the program itself and for nobody. */
export function recordAudit(tx: Tx, ctx: Context, record: AuditRecord): void {
  const added = prepared(
    tx.client,
    `insert into audit_events (at, actor, action, subject_kind, subject_id, fields, act_id)
     values (?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    ctx.now,
    ctx.actor.kind === "person" ? ctx.actor.id : null,
    record.action,
    record.subjectKind,
    record.subjectId,
    JSON.stringify(record.fields),
    record.actId ?? null,
  );
  if (!record.personal) return;
  const insert = prepared(
    tx.client,
    "insert into audit_values (event_id, field, value) values (?, ?, ?)",
  );
  for (const [field, value] of Object.entries(record.personal)) {
    insert.run(added.lastInsertRowid, field, value);
  }
}

/** Empties the personal values of every audit row about one record; the rows stay. */
export function eraseAuditValuesIn(tx: Tx, subjectKind: string, subjectId: string): void {
  prepared(
    tx.client,
    `update audit_values set value = null
     where event_id in (select id from audit_events where subject_kind = ? and subject_id = ?)`,
  ).run(subjectKind, subjectId);
}

export type CorrectionRecord = {
  /** The request's id. */
  id: string;
  subjectKind: string;
  subjectId: string;
  /** null: nothing stands in its place. */
  replacementId: string | null;
  reason: string;
  doneBy: string;
  actId: number;
};

/** Keeps why a record was taken back and what stands in its place. The ledger has only the reason's salted hash. */
export function insertCorrectionIn(tx: Tx, ctx: Context, record: CorrectionRecord): void {
  prepared(
    tx.client,
    `insert into corrections (id, subject_kind, subject_id, replacement_id, reason, done_by, at, act_id)
     values (?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    record.id,
    record.subjectKind,
    record.subjectId,
    record.replacementId,
    record.reason,
    record.doneBy,
    ctx.now,
    record.actId,
  );
}
