/** Piles and rejects of a session as they were weighed. */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import type { SortedFraction } from "../contract/sortings";

type Pile = NonNullable<SortedFraction["pile"]>;

export type StoredFraction = {
  /** null for a reject. */
  pile: (Pile & { colourCode: string; lotClosed: boolean }) | null;
  rejectReason: string | null;
  rejectName: string | null;
  grossMilligrams: number;
  tareMilligrams: number;
  netGrams: number;
};

type Row = Omit<Pile, "lotNumber"> &
  Omit<StoredFraction, "pile"> & {
    colourCode: string;
    lotNumber: number | null;
    closedAt: number | null;
  };

/** In the order in which they were weighed. */
export function listFractions(db: Readable, sortingId: string): StoredFraction[] {
  const found = prepared(
    db.client,
    `select r.polymer, r.kind, m.form, m.wash, r.colour_code as colourCode,
            coalesce(c.name, r.colour_code) as colourName, coalesce(c.hex, '#8d9490') as colourHex,
            coalesce(c.look, 'solid') as colourLook, l.number as lotNumber, l.closed_at as closedAt,
            f.reject_reason as rejectReason, rr.name as rejectName, f.gross_mg as grossMilligrams,
            f.tare_mg as tareMilligrams, f.net_grams as netGrams
       from fractions f
       join materials m on m.id = f.material_id
       join "rows" r on r.id = m.row_id
       left join colours c on c.code = r.colour_code
       left join lots l on l.id = f.lot_id
       left join reject_reasons rr on rr.code = f.reject_reason
      where f.session_id = ? order by f.seq`,
  ).all(sortingId) as Row[];
  return found.map(
    ({
      rejectReason,
      rejectName,
      grossMilligrams,
      tareMilligrams,
      netGrams,
      lotNumber,
      closedAt,
      ...pile
    }) => ({
      pile: lotNumber === null ? null : { ...pile, lotNumber, lotClosed: closedAt !== null },
      rejectReason,
      rejectName,
      grossMilligrams,
      tareMilligrams,
      netGrams,
    }),
  );
}

/** What a bag's page shows of it. */
export function asSorted({ pile, rejectName, netGrams }: StoredFraction): SortedFraction {
  if (!pile) return { pile: null, rejectName, netGrams };
  const { colourCode: _code, lotClosed: _closed, ...shown } = pile;
  return { pile: shown, rejectName, netGrams };
}
