/** Reads of weigh-ins. */
import "server-only";
import { getBagByCode, getLabel } from "@/lib/bags/queries";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { BagId, Id, PersonId, PointId, WeighInId } from "@/lib/core/ids";
import type { PolymerAnswer } from "@/lib/core/plastics";
import { dayOf, startOfDay, type Instant } from "@/lib/core/time";
import { mayStillUndo, undoUntil } from "@/lib/core/undo";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { getContainer } from "@/lib/scales/queries/scales";
import type { Scanned, Ticket, Today, TodayInput } from "../contract/weigh-ins";
import type { Condition, WeighInState } from "../terms";

export type WeighIn = {
  id: WeighInId;
  bagId: BagId;
  code: LabelCode;
  doneBy: PersonId;
  recordedAt: Instant;
  state: WeighInState;
  netGrams: number;
  actId: number | null;
  corrects: WeighInId | null;
};

const WEIGH_IN = `w.id, w.bag_id as bagId, b.code, w.done_by as doneBy, w.recorded_at as recordedAt, w.state,
  w.net_grams as netGrams, w.act_id as actId, w.corrects`;

/** The weigh-in of a bag that counts, if it was weighed. At most one per bag. */
export function getPostedWeighIn(db: Readable, bagId: BagId): WeighIn | null {
  const row = prepared(
    db.client,
    `select ${WEIGH_IN} from weigh_ins w join bags b on b.id = w.bag_id
      where w.bag_id = ? and w.state = 'posted'`,
  ).get(bagId);
  return (row as WeighIn | undefined) ?? null;
}

export function getWeighIn(db: Readable, id: WeighInId): WeighIn | null {
  const row = prepared(
    db.client,
    `select ${WEIGH_IN} from weigh_ins w join bags b on b.id = w.bag_id where w.id = ?`,
  ).get(id);
  return (row as WeighIn | undefined) ?? null;
}

const BAGS_THAT_TELL = 20;

/** Net grams of the point's last bags in the ledger, at most twenty. */
export function listLastNets(db: Readable, pointId: PointId): number[] {
  return prepared(
    db.client,
    `select net_grams from weigh_ins where point_id = ? and state = 'posted'
      order by recorded_at desc limit ${BAGS_THAT_TELL}`,
  )
    .pluck()
    .all(pointId) as number[];
}

/** A helper's name for a sentence such as "weighed by …"; a person who was erased has none. */
export function helperName(db: Readable, id: string): string {
  const name = prepared(db.client, "select name from people where id = ?").pluck().get(id) as
    string | undefined;
  return name ? name : "somebody who has left";
}

export type BagWeighIn = {
  id: WeighInId;
  state: WeighInState;
  netGrams: number;
  occurredAt: Instant;
  condition: Condition;
  polymer: PolymerAnswer;
  colourName: string | null;
  lotNumber: number | null;
  byName: string;
};

/** Every weighing of a bag, also second readings and undone ones, oldest first. */
export function listWeighInsOfBag(ctx: Context, bagId: BagId): BagWeighIn[] {
  allow(ctx, "bags.read");
  const db = ctx.db.reader;
  const rows = prepared(
    db.client,
    `select w.id, w.state, w.net_grams as netGrams, w.occurred_at as occurredAt, w.condition, w.polymer,
       c.name as colourName, l.number as lotNumber, w.done_by as byName
      from weigh_ins w left join colours c on c.code = w.colour_code left join lots l on l.id = w.lot_id
      where w.bag_id = ? order by w.recorded_at, w.id`,
  ).all(bagId) as BagWeighIn[];
  return rows.map((row) => ({ ...row, byName: helperName(db, row.byName) }));
}

/** What a scanned or typed code stands for. @throws AppError `unknown-code` */
export function getScanned(ctx: Context, input: { code: LabelCode }): Scanned {
  allow(ctx, "bags.read");
  return inSnapshot(ctx, (db): Scanned => {
    const { code } = input;
    const label = getLabel(db, code);
    if (!label) throw new AppError("unknown-code", { code: formatCode(code) }, ["code"]);
    if (label.kind === "container") {
      const container = getContainer(db, label.subject as Id<"container">);
      if (!container) throw new AppError("unknown-code", { code: formatCode(code) }, ["code"]);
      const { id, name, tareMilligrams } = container;
      return { kind: "container", id, code, name, tareMilligrams };
    }
    const bag = label.kind === "bag" ? getBagByCode(db, code) : null;
    if (!bag) return { kind: "other", code, label: label.kind };
    const posted = getPostedWeighIn(db, bag.id);
    return {
      kind: "bag",
      id: bag.id,
      code: bag.code,
      state: bag.state,
      since: bag.stateSince,
      point: bag.pointId === null ? null : { id: bag.pointId, name: bag.pointName ?? "" },
      weighIn: posted && {
        id: posted.id,
        who: helperName(db, posted.doneBy),
        when: posted.recordedAt,
        netGrams: posted.netGrams,
      },
    };
  });
}

type TicketRow = Omit<Ticket, "mine" | "undoUntil" | "oneKind" | "belowMinimum"> & {
  doneBy: string;
  oneKind: 0 | 1;
  belowMinimum: 0 | 1;
};

/** The tickets that were recorded today, by the scheme's calendar; undone ones stay in the list. */
export function getToday(ctx: Context, input: TodayInput): Today {
  allow(ctx, "weighing.record");
  const helperId = requirePerson(ctx);
  return inSnapshot(ctx, (db) => {
    const { timeZone } = requireScheme(db);
    const from = startOfDay(dayOf(ctx.now, timeZone), timeZone);
    const sums = prepared(
      db.client,
      `select count(*) as ticketCount, count(*) filter (where state = 'posted') as bags,
         coalesce(sum(net_grams) filter (where state = 'posted'), 0) as netGrams
        from weigh_ins where recorded_at >= ?`,
    ).get(from) as Pick<Today, "ticketCount" | "bags" | "netGrams">;
    const rows = prepared(
      db.client,
      `select w.id, b.code, p.name as pointName, w.net_grams as netGrams, w.state, w.condition,
         w.below_minimum as belowMinimum, w.polymer, w.one_kind as oneKind, c.name as colourName,
         l.number as lotNumber, h.name as byName, w.done_by as doneBy, w.recorded_at as recordedAt
        from weigh_ins w join bags b on b.id = w.bag_id join points p on p.id = w.point_id
          join people h on h.id = w.done_by
          left join colours c on c.code = w.colour_code left join lots l on l.id = w.lot_id
        where w.recorded_at >= ? order by w.recorded_at desc, w.id desc limit ?`,
    ).all(from, Number(input.limit)) as TicketRow[];
    return {
      helperId,
      now: ctx.now,
      timeZone,
      ...sums,
      tickets: rows.map(({ doneBy, ...row }) => {
        const mine = doneBy === helperId;
        const open =
          mine &&
          (row.state === "posted" || row.state === "for-review") &&
          mayStillUndo(row.recordedAt as Instant, ctx.now);
        return {
          ...row,
          byName: row.byName || helperName(db, doneBy),
          oneKind: row.oneKind === 1,
          belowMinimum: row.belowMinimum === 1,
          mine,
          undoUntil: open ? undoUntil(row.recordedAt) : null,
        };
      }),
    };
  });
}
