/**
 * A report worked out anew from every line and its parts, sharing nothing with the program's totals or
 * queries: what the report is compared with.
 */
import type { Db } from "@/db/client";
import type { Figures } from "@/lib/reports/rules/balance";
import type { Grouping } from "@/lib/reports/terms";

type Part = {
  entry: number;
  kind: string;
  reversedKind: string | null;
  day: string;
  account: string;
  cause: string | null;
  row: number;
  polymer: string | null;
  materialKind: string | null;
  colour: string | null;
  origin: number;
  originType: string;
  grams: number;
};

export type Plain = Pick<
  Figures,
  | "opening"
  | "collected"
  | "disposed"
  | "loss"
  | "difference"
  | "accepted"
  | "rejected"
  | "resorted"
  | "closing"
  | "bags"
>;

const ZERO: Plain = {
  opening: 0,
  collected: 0,
  disposed: 0,
  loss: 0,
  difference: 0,
  accepted: 0,
  rejected: 0,
  resorted: 0,
  closing: 0,
  bags: 0,
};

function keyOf(part: Part, by: readonly Grouping[]): string {
  const loose = part.row === 1 ? "unsorted" : part.row === 2 ? "reject" : null;
  const values: Record<Grouping, string | number | null> = {
    month: part.day.slice(0, 7),
    point: part.origin,
    polymer: loose ?? part.polymer,
    kind: loose ?? part.materialKind,
    colour: loose ?? part.colour,
  };
  return by.map((grouping) => values[grouping]).join("|");
}

/** Figures by key for the days [from, until). `by` without month. */
export function plainReport(
  db: Db,
  from: string,
  until: string,
  by: readonly Grouping[],
): Map<string, Plain> {
  const parts = db.reader.client
    .prepare(
      `select e.id as entry, e.kind, (select o.kind from entries o where o.id = e.reverses) as reversedKind,
              e.booked_day as day, l.account, l.cause, m.row_id as "row", r.polymer, r.kind as materialKind,
              r.colour_code as colour, p.key as origin, o.type as originType, p.grams
         from entries e join lines l on l.entry_id = e.id
         join line_parts p on p.entry_id = l.entry_id and p.seq = l.seq and p.dim = 'O'
         join materials m on m.id = l.material_id join "rows" r on r.id = m.row_id
         join origins o on o.no = p.key
        order by e.id, l.seq, p.key`,
    )
    .all() as Part[];
  const accounts = new Map<number, Set<string>>();
  for (const part of parts) {
    const known = accounts.get(part.entry) ?? new Set<string>();
    accounts.set(part.entry, known.add(part.account));
  }
  const found = new Map<string, Plain>();
  const at = (key: string): Plain => {
    let plain = found.get(key);
    if (!plain) found.set(key, (plain = { ...ZERO }));
    return plain;
  };
  const counted = new Set<number>();
  for (const part of parts) {
    if (part.day >= until) continue;
    const plain = at(keyOf(part, by));
    const inShed = ["bag", "lot", "run", "reject-bin"].includes(part.account);
    if (inShed) plain.closing += part.grams;
    if (part.day < from) {
      if (inShed) plain.opening += part.grams;
      continue;
    }
    const together = accounts.get(part.entry) ?? new Set();
    if (part.account === "source" && part.originType === "donated") plain.collected -= part.grams;
    if (part.account === "disposed") plain.disposed += part.grams;
    if (part.account === "loss") plain.loss += part.grams;
    if (part.account === "difference") plain.difference += part.grams;
    if (part.account === "reject-bin" && (together.has("bag") || together.has("lot"))) {
      plain.rejected += part.grams;
    }
    if (part.account === "lot") {
      if (together.has("bag")) plain.accepted += part.grams;
      else if (together.has("reject-bin")) plain.accepted += part.grams;
    }
    const kind = part.reversedKind ?? part.kind;
    if (kind === "weigh-in" && part.account === "bag" && !counted.has(part.entry)) {
      counted.add(part.entry);
      plain.bags += part.grams > 0 ? 1 : -1;
    }
  }
  for (const plain of found.values()) {
    plain.resorted =
      plain.closing -
      plain.opening -
      plain.collected +
      plain.disposed +
      plain.loss +
      plain.difference;
  }
  for (const [key, plain] of found) {
    if (Object.values(plain).every((value) => value === 0)) found.delete(key);
  }
  return found;
}
