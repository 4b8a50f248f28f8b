/**
 * The mass balance of any days, read from the totals by month and, at the ragged ends, by day. Takes the
 * connection as an argument, because the export reads the same through one of its own.
 */
import "server-only";
import { KINDS, POLYMER_ANSWERS, type Kind, type PolymerAnswer } from "@/lib/core/plastics";
import {
  firstDayOf,
  monthOf,
  monthsAndDays,
  nextMonth,
  type Day,
  type Month,
  type Period,
} from "@/lib/core/time";
import type { OriginType } from "@/lib/ledger/terms";
import { prepared, type Readable } from "@/lib/platform/database";
import {
  addMoved,
  figuresOf,
  isStill,
  NOTHING_MOVED,
  type Figures,
  type Moved,
} from "../rules/balance";
import { LOOSE_ROWS, type Grouping, type LooseRow } from "../terms";

/** What a row is about; null where the report is not broken down by it. */
export type BalanceKey = {
  month: Month | null;
  originNo: number | null;
  polymer: PolymerAnswer | LooseRow | null;
  kind: Kind | LooseRow | null;
  colourCode: string | null;
};
export type BalanceRow = BalanceKey & {
  originType: OriginType | null;
  pointName: string | null;
  colourName: string | null;
  figures: Figures;
};

const SUMS = `sum(t.held) as held, sum(t.collected) as collected, sum(t.other_in) as otherIn,
  sum(t.opening) as openingCount, sum(t.accepted) as accepted, sum(t.rejected) as rejected,
  sum(t.disposed) as disposed, sum(t.passed_proven) as passedProven,
  sum(t.passed_unproven) as passedUnproven, sum(t.loss) as loss, sum(t.difference) as difference,
  sum(t.pieces) as pieces, sum(t.bags) as bags, sum(t.before_opening) as beforeOpening`;

const LOOSE = "case r.id when 1 then 'unsorted' when 2 then 'reject'";
const KEYS: Record<Grouping, { sql: string; name: keyof BalanceKey }> = {
  month: { sql: "t.month", name: "month" },
  point: { sql: "t.origin_no", name: "originNo" },
  polymer: { sql: `${LOOSE} else r.polymer end`, name: "polymer" },
  kind: { sql: `${LOOSE} else r.kind end`, name: "kind" },
  colour: { sql: `${LOOSE} else r.colour_code end`, name: "colourCode" },
};

const COLUMNS = `row_id, origin_no, held, collected, other_in, opening, disposed, passed_proven, passed_unproven,
  loss, difference, pieces, accepted, rejected, bags, before_opening`;

type Source = { from: string; values: string[] };

/** Totals of a period as one list of rows: whole months from one table, ragged ends from the other. */
function totalsOf(period: Period): Source {
  const { months, days } = monthsAndDays(period);
  const selects: string[] = [];
  const values: string[] = [];
  if (months) {
    selects.push(`select month, ${COLUMNS} from totals_month where month >= ? and month < ?`);
    values.push(months.from, months.until);
  }
  for (const part of days) {
    selects.push(
      `select substr(day, 1, 7) as month, ${COLUMNS} from totals_day where day >= ? and day < ?`,
    );
    values.push(part.from, part.until);
  }
  return { from: selects.join(" union all "), values };
}

type Sums = Partial<BalanceKey> & Moved;
/** Without a grouping, SQL answers one row of nulls for an empty period. */
type FoundSums = Sums | { [Key in keyof Sums]: null };

const isSums = (row: FoundSums): row is Sums => row.held !== null;

function sumsOf(db: Readable, period: Period, by: readonly Grouping[]): Sums[] {
  const source = totalsOf(period);
  if (source.from === "") return [];
  const keys = by.map((grouping) => KEYS[grouping]);
  const sql = `select ${keys.map((key) => `${key.sql} as ${key.name}, `).join("")}${SUMS}
      from (${source.from}) t join rows r on r.id = t.row_id
     ${keys.length > 0 ? `group by ${keys.map((key) => key.sql).join(", ")}` : ""}`;
  const found = prepared(db.client, sql).all(...source.values) as FoundSums[];
  return found.filter(isSums);
}

/** Earliest day of any total: reading from here is reading from the beginning. */
const BEGINNING = "0001-01-01" as Day;

function keyOf(row: Partial<BalanceKey>, month: Month | null): BalanceKey {
  return {
    month,
    originNo: row.originNo ?? null,
    polymer: row.polymer ?? null,
    kind: row.kind ?? null,
    colourCode: row.colourCode ?? null,
  };
}

const textOf = (key: BalanceKey): string =>
  [key.originNo, key.polymer, key.kind, key.colourCode].join("|");

type Group = { key: BalanceKey; opening: number; byMonth: Map<Month | null, Moved> };

/**
 * Rows of the report, month by month, each balancing to the gram. A row that holds nothing and in which
 * nothing moved is left out, months after `today` too.
 *
 * @param period booked days, end exclusive
 * @param today in the scheme's zone
 */
export function listBalance(
  db: Readable,
  period: Period,
  by: readonly Grouping[],
  today: Day,
): BalanceRow[] {
  const groups = new Map<string, Group>();
  const groupOf = (row: Partial<BalanceKey>): Group => {
    const key = keyOf(row, null);
    const text = textOf(key);
    let group = groups.get(text);
    if (!group) groups.set(text, (group = { key, opening: 0, byMonth: new Map() }));
    return group;
  };

  const still = by.filter((grouping) => grouping !== "month");
  for (const row of sumsOf(db, { from: BEGINNING, until: period.from }, still)) {
    groupOf(row).opening = row.held;
  }
  for (const row of sumsOf(db, period, by)) {
    const { month, originNo: _o, polymer: _p, kind: _k, colourCode: _c, ...moved } = row;
    const group = groupOf(row);
    const at = month ?? null;
    group.byMonth.set(at, addMoved(group.byMonth.get(at) ?? NOTHING_MOVED, moved));
  }

  let last = monthOf(today);
  for (const group of groups.values()) {
    for (const month of group.byMonth.keys()) if (month !== null && month > last) last = month;
  }
  const months = by.includes("month") ? monthsOf(period, last) : [null];
  const rows: { key: BalanceKey; figures: Figures }[] = [];
  for (const group of groups.values()) {
    let opening = group.opening;
    for (const month of months) {
      const moved = group.byMonth.get(month) ?? NOTHING_MOVED;
      if (opening === 0 && isStill(moved)) continue;
      const figures = figuresOf(opening, moved);
      rows.push({ key: { ...group.key, month }, figures });
      opening = figures.closing;
    }
  }
  return named(db, rows);
}

/** Months that a period touches, up to the last one that can show anything. */
function monthsOf(period: Period, last: Month): Month[] {
  const months: Month[] = [];
  for (
    let month = monthOf(period.from);
    firstDayOf(month) < period.until;
    month = nextMonth(month)
  ) {
    if (month > last) break;
    months.push(month);
  }
  return months;
}

/** Adds the names that people read. */
function named(db: Readable, rows: readonly { key: BalanceKey; figures: Figures }[]): BalanceRow[] {
  const origins = new Map(
    (
      prepared(
        db.client,
        "select o.no, o.type, p.name from origins o left join points p on p.id = o.point_id",
      ).all() as { no: number; type: OriginType; name: string | null }[]
    ).map((origin) => [origin.no, origin]),
  );
  const colours = new Map(
    (
      prepared(db.client, "select code, name from colours order by position, code").all() as {
        code: string;
        name: string;
      }[]
    ).map((colour) => [colour.code, colour.name]),
  );
  const found = rows.map(({ key, figures }) => {
    const origin = key.originNo === null ? undefined : origins.get(key.originNo);
    return {
      ...key,
      originType: origin?.type ?? null,
      pointName: origin?.name ?? null,
      colourName: key.colourCode === null ? null : (colours.get(key.colourCode) ?? null),
      figures,
    };
  });
  return inOrder(found, [...colours.keys()]);
}

/** By month, then point by name, then polymer, kind and colour in the order of their lists. */
function inOrder(rows: BalanceRow[], colours: readonly string[]): BalanceRow[] {
  const ranked = (list: readonly string[]) => {
    const ranks = new Map([LOOSE_ROWS[0], ...list, LOOSE_ROWS[1]].map((key, at) => [key, at]));
    return (key: string | null): number => (key === null ? -1 : (ranks.get(key) ?? ranks.size));
  };
  const polymer = ranked(POLYMER_ANSWERS);
  const kind = ranked(KINDS);
  const colour = ranked(colours);
  const names = new Intl.Collator("en", { numeric: true });
  return rows.sort(
    (a, b) =>
      (a.month ?? "").localeCompare(b.month ?? "") ||
      names.compare(a.pointName ?? "", b.pointName ?? "") ||
      (a.originNo ?? 0) - (b.originNo ?? 0) ||
      polymer(a.polymer) - polymer(b.polymer) ||
      kind(a.kind) - kind(b.kind) ||
      colour(a.colourCode) - colour(b.colourCode),
  );
}
