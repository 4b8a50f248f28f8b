/** Lots: lists of them, and one with where its content came from. */
import "server-only";
import type * as z from "zod";
import type { Id, LotId } from "@/lib/core/ids";
import type { OriginType } from "@/lib/ledger/terms";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { listLotsEndpoint, LotSummary } from "../contract/lots";
import { lastSeen } from "./lot-record";

const PAGE = 100;

const SUMMARY = `
  l.number, r.polymer, r.kind, r.colour_code as colourCode, m.form, m.wash,
  coalesce(c.name, r.colour_code) as colourName, coalesce(c.hex, '#8d9490') as colourHex,
  coalesce(c.look, 'solid') as colourLook, l.place, l.opened_at as openedAt, l.closed_at as closedAt,
  l.closed_for as closedFor, (select name from containers where id = l.container_id) as containerName,
  coalesce(b.grams, 0) as heldGrams`;

const FILTERED = `(@polymer is null or r.polymer = @polymer)
     and (@colourCode is null or r.colour_code = @colourCode) and (@kind is null or r.kind = @kind)
     and (@form is null or m.form = @form) and (@wash is null or m.wash = @wash)
     and (@place is null or l.place like @place escape '\\') and (@containerId is null or l.container_id = @containerId)`;

/** Walks what is held, so that a thousand emptied lots cost nothing. */
export const HELD_LOTS_SQL = `
  select ${SUMMARY}
    from balances b
    join lots l on l.holder_id = b.holder_id
    join materials m on m.id = b.material_id
    join rows r on r.id = m.row_id
    left join colours c on c.code = r.colour_code
   where b.grams > 0 and b.material_id > 2
     and ${FILTERED} and l.number > @after
   order by l.number limit @limit`;

/**
 * Walks the materials, of which there are few, and finds each one's open lots by its index; left to itself
 * the planner walks every lot there ever was, by number.
 */
export const OPEN_LOTS_SQL = `
  select ${SUMMARY}
    from materials m
    join rows r on r.id = m.row_id
    join lots l indexed by lots_material on l.material_id = m.id and l.closed_at is null
    left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id
    left join colours c on c.code = r.colour_code
   where ${FILTERED} and l.number > @after
   order by l.number limit @limit`;

/** Walks lots by number from where the last page ended, and stops when a page is full. */
const walkLots = (condition: string): string => `
  select ${SUMMARY}
    from lots l
    join materials m on m.id = l.material_id
    join rows r on r.id = m.row_id
    left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id
    left join colours c on c.code = r.colour_code
   where l.number > @after and ${condition} and ${FILTERED}
   order by l.number limit @limit`;

export const LOTS_SQL = {
  held: HELD_LOTS_SQL,
  open: OPEN_LOTS_SQL,
  closed: walkLots("l.closed_at is not null and b.grams > 0"),
  empty: walkLots("coalesce(b.grams, 0) = 0"),
  all: walkLots("true"),
} as const;

/** "Rack B" anywhere in the place; what SQL's LIKE would read as a sign of its own is taken as it stands. */
function placePattern(text: string | undefined): string | null {
  return text ? `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%` : null;
}

/** Lots by number, which is the order of opening: those that hold something unless another state is asked for. */
export function listLots(
  ctx: Context,
  input: z.output<typeof listLotsEndpoint.input>,
): z.output<typeof listLotsEndpoint.output> {
  allow(ctx, "stock.read");
  const one = input.number;
  const sql = LOTS_SQL[one === undefined ? input.state : "all"];
  const walked = prepared(ctx.db.reader.client, sql).all({
    polymer: input.polymer ?? null,
    colourCode: input.colourCode ?? null,
    kind: input.kind ?? null,
    form: input.form ?? null,
    wash: input.wash ?? null,
    place: placePattern(input.place),
    containerId: input.containerId ?? null,
    after: one === undefined ? (input.after ?? 0) : one - 1,
    limit: one === undefined ? PAGE + 1 : 1,
  }) as LotSummary[];
  const found = one === undefined ? walked : walked.filter((lot) => lot.number === one);
  const lots = found.slice(0, PAGE);
  return { lots, next: found.length > PAGE ? (lots.at(-1)?.number ?? null) : null };
}

export type LotOrigin = {
  originNo: number;
  type: OriginType;
  pointName: string | null;
  grams: number;
};
export type LotHeated = { times: number; grams: number };
export type LotBag = { code: string; pointName: string | null; sortedAt: number; grams: number };

export type LotView = LotSummary & {
  lotId: LotId;
  containerId: Id<"container"> | null;
  /** Its last entry and count: a count that is sent says what was seen. */
  seen: { entryId: number; countId: string | null };
  /** What its label's QR holds. */
  labelCode: string;
  origins: LotOrigin[];
  heated: LotHeated[];
  /** Bags that went in, newest first; at most {@link MOST_BAGS}. */
  bags: LotBag[];
  /** There are older ones: counting them would mean to walk everything that ever happened to the lot. */
  moreBags: boolean;
};

const MOST_BAGS = 12;

const LOT_SQL = `
  select l.id as lotId, l.holder_id as holderId, l.material_id as materialId, h.code as labelCode,
         l.container_id as containerId, ${SUMMARY}
    from lots l
    join holders h on h.id = l.holder_id
    join materials m on m.id = l.material_id
    join rows r on r.id = m.row_id
    left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id
    left join colours c on c.code = r.colour_code
   where l.number = ?`;

type LotRow = LotSummary & {
  lotId: LotId;
  holderId: number;
  materialId: number;
  labelCode: string;
  containerId: Id<"container"> | null;
};

function listOrigins(db: Readable, lot: LotRow): LotOrigin[] {
  return prepared(
    db.client,
    `select o.no as originNo, o.type, p.name as pointName, parts.grams
       from parts join origins o on o.no = parts.key left join points p on p.id = o.point_id
      where parts.holder_id = ? and parts.material_id = ? and parts.dim = 'O'
      order by parts.grams desc, o.no`,
  ).all(lot.holderId, lot.materialId) as LotOrigin[];
}

function listHeated(db: Readable, lot: LotRow): LotHeated[] {
  return prepared(
    db.client,
    `select key as times, grams from parts
      where holder_id = ? and material_id = ? and dim = 'H' order by key`,
  ).all(lot.holderId, lot.materialId) as LotHeated[];
}

/**
 * Walks the lot's own lines back from the newest, because those are indexed by holder, and stops when it has
 * met enough: a bag of one kind goes in at the scale, any other by its sorting. A sorting of several bags is
 * one entry, so up to {@link MOST_BAGS} entries hold at least as many bags.
 */
export const LOT_BAGS_SQL = `
  select g.code, p.name as pointName, f.sortedAt, f.grams
    from (
      select n.entry_id as entryId, sum(n.grams) as grams, s.id as sessionId, w.bag_id as bagId,
             w.point_id as pointId, coalesce(s.occurred_at, w.occurred_at) as sortedAt
        from lines n
        join entries e on e.id = n.entry_id and e.kind = 'sort'
        left join weigh_ins w on e.subject like 'weigh-in:%' and w.id = substr(e.subject, 10) and w.state = 'posted'
        left join sorting_sessions s on e.subject like 'sorting:%' and s.id = substr(e.subject, 9) and s.state = 'closed'
       where n.holder_id = @holderId and n.grams > 0 and (w.id is not null or s.id is not null)
       group by n.entry_id order by n.entry_id desc limit ${MOST_BAGS + 1}) f
    left join sorting_bags sb on sb.session_id = f.sessionId and sb.live = 1
    join bags g on g.id = coalesce(f.bagId, sb.bag_id)
    left join points p on p.id = case when f.sessionId is null then f.pointId else g.point_id end
   order by f.entryId desc, g.code limit ${MOST_BAGS + 1}`;

/** One lot by its number, or null. */
export function getLot(ctx: Context, number: number): LotView | null {
  allow(ctx, "stock.read");
  return inSnapshot<LotView | null>(ctx, (db) => {
    const lot = prepared(db.client, LOT_SQL).get(number) as LotRow | undefined;
    if (!lot) return null;
    const { holderId: _holder, materialId: _material, ...summary } = lot;
    const bags = prepared(db.client, LOT_BAGS_SQL).all({ holderId: lot.holderId }) as LotBag[];
    return {
      ...summary,
      seen: lastSeen(db, lot),
      origins: listOrigins(db, lot),
      heated: listHeated(db, lot),
      bags: bags.slice(0, MOST_BAGS),
      moreBags: bags.length > MOST_BAGS,
    };
  });
}
