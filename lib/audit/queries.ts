/** Reads of the audit. */
import "server-only";
import { addDays, startOfDay } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import type { AuditRow, SearchAudit } from "./contract";

const PAGE = 50;

type Row = Omit<AuditRow, "actor" | "fields" | "personal"> & {
  fields: string;
  actorId: string | null;
  actorName: string | null;
};

/** Walks the rows backwards by their number, which is the order of writing. */
const SEARCH_SQL = `
  select e.id, e.at, e.action, e.subject_kind as subjectKind, e.subject_id as subjectId, e.fields, e.act_id as actId,
         e.actor as actorId, p.name as actorName
    from audit_events e left join people p on p.id = e.actor
   where e.id < @before
     and (@area is null or substr(e.action, 1, length(@area) + 1) = @area || '.')
     and (@actor is null or e.actor = @actor)
     and (@from is null or e.at >= @from) and (@until is null or e.at < @until)
     and (@text is null or instr(e.action, @text) > 0 or instr(e.subject_id, @text) > 0
       or instr(lower(e.fields), @text) > 0
       or exists (select 1 from audit_values v where v.event_id = e.id and instr(lower(v.value), @text) > 0))
   order by e.id desc limit ${PAGE + 1}`;

/** One page of the audit, newest first. */
export function searchAudit(
  ctx: Context,
  input: SearchAudit,
): { rows: AuditRow[]; next: string | null } {
  allow(ctx, "audit.read");
  return inSnapshot<{ rows: AuditRow[]; next: string | null }>(ctx, (db) => {
    const { timeZone } = requireScheme(db);
    const found = prepared(db.client, SEARCH_SQL).all({
      before: input.before === undefined ? Number.MAX_SAFE_INTEGER : Number(input.before),
      area: input.area || null,
      actor: input.actor ?? null,
      from: input.from ? startOfDay(input.from, timeZone) : null,
      until: input.to ? startOfDay(addDays(input.to, 1), timeZone) : null,
      text: input.text ? input.text.toLowerCase() : null,
    }) as Row[];
    const page = found.slice(0, PAGE);
    const last = page.at(-1);
    return {
      rows: page.map((row) => toRow(db, row)),
      next: found.length > PAGE && last ? String(last.id) : null,
    };
  });
}

function toRow(db: Readable, { fields, actorId, actorName, ...row }: Row): AuditRow {
  const personal = prepared(
    db.client,
    "select field, value from audit_values where event_id = ? order by field",
  ).all(row.id) as AuditRow["personal"];
  return {
    ...row,
    actor: actorId === null ? null : { id: actorId, name: actorName || "somebody who has left" },
    fields: JSON.parse(fields) as AuditRow["fields"],
    personal,
  };
}

/** Whoever has acted at least once, by name: what the search offers. */
export function listActors(ctx: Context): { id: string; name: string }[] {
  allow(ctx, "audit.read");
  return prepared(
    ctx.db.reader.client,
    `select p.id, case p.name when '' then 'somebody who has left' else p.name end as name
       from people p where exists (select 1 from audit_events e where e.actor = p.id) order by name, p.id`,
  ).all() as { id: string; name: string }[];
}
