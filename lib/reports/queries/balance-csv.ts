/** The balance as a CSV file and its W3C CSVW description: one list of columns makes both. */
import "server-only";
import { csvText } from "@/lib/core/csv";
import { KIND_NAMES, type Kind } from "@/lib/core/plastics";
import { dayOf, type Instant, type Period } from "@/lib/core/time";
import { ledgerHead, type LedgerHead } from "@/lib/ledger/queries/entries";
import { onOneState, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { figureColumns, type CsvColumn } from "../rules/csv-columns";
import { exportName, lastDayOf } from "../rules/periods";
import { GROUPINGS, LOOSE_NAMES, ORIGIN_NAMES, type Grouping, type LooseRow } from "../terms";
import { listBalance, type BalanceRow } from "./balance";

const isLoose = (text: string): text is LooseRow => text in LOOSE_NAMES;

const KEY_COLUMNS: Record<Grouping, readonly CsvColumn<BalanceRow>[]> = {
  month: [
    {
      name: "month",
      definition: "Calendar month in the scheme's time zone.",
      datatype: "gYearMonth",
      cell: (row) => row.month,
    },
  ],
  point: [
    {
      name: "point",
      definition:
        "Drop-off point that the plastic is attributed to by weight; else where it came from.",
      datatype: "string",
      cell: (row) =>
        row.pointName ?? (row.originType === null ? null : ORIGIN_NAMES[row.originType]),
    },
    {
      name: "origin",
      definition: "donated, collector, pre-consumer, bought, additive or unknown.",
      datatype: "string",
      cell: (row) => row.originType,
    },
  ],
  polymer: [
    {
      name: "polymer",
      definition: "ISO 1043-1 abbreviation; not-sure, unsorted (bags not sorted yet) or reject.",
      datatype: "string",
      cell: (row) => row.polymer,
    },
  ],
  kind: [
    {
      name: "kind",
      definition: "What the plastic was: lids, bottles and so on; unsorted or reject.",
      datatype: "string",
      cell: (row) => kindWords(row.kind),
    },
  ],
  colour: [
    {
      name: "colour",
      definition: "Name in the scheme's palette; unsorted or reject.",
      datatype: "string",
      cell: (row) =>
        row.colourName ??
        (row.colourCode !== null && isLoose(row.colourCode)
          ? LOOSE_NAMES[row.colourCode]
          : row.colourCode),
    },
  ],
};

function kindWords(kind: Kind | LooseRow | null): string | null {
  if (kind === null) return null;
  return isLoose(kind) ? LOOSE_NAMES[kind] : KIND_NAMES[kind];
}

function columnsOf(
  period: Period,
  by: readonly Grouping[],
  hasBalance: boolean,
  head: LedgerHead,
): CsvColumn<BalanceRow>[] {
  const fixed = (
    name: string,
    definition: string,
    datatype: CsvColumn<BalanceRow>["datatype"],
    value: string | number,
  ): CsvColumn<BalanceRow> => ({ name, definition, datatype, cell: () => value });
  return [
    ...GROUPINGS.filter((grouping) => by.includes(grouping)).flatMap(
      (grouping) => KEY_COLUMNS[grouping],
    ),
    ...figureColumns<BalanceRow>((row) => row.figures, hasBalance),
    fixed("period_from", "First day of the report.", "date", period.from),
    fixed("period_to", "Last day of the report.", "date", lastDayOf(period)),
    fixed(
      "ledger_entry",
      "Number of the ledger's last entry when the file was made.",
      "integer",
      head.entryId,
    ),
    fixed(
      "ledger_hash",
      "SHA-256 of that entry, which seals all entries before it.",
      "string",
      head.hash,
    ),
  ];
}

/**
 * Does the shed's book reach over the whole period? Not where history from before the first day was entered:
 * such plastic feeds collected figures only, and no balance is shown.
 */
export function hasBalance(period: Period, firstDay: string, rows: readonly BalanceRow[]): boolean {
  return period.from >= firstDay || rows.every((row) => row.figures.beforeOpening === 0);
}

/** Rows of one piece of the file. */
const PIECE = 1000;

/** The file's text, piece by piece. Reads everything first, so that all rows are of one state of the ledger. */
export function* balanceCsv(
  db: Readable,
  period: Period,
  by: readonly Grouping[],
  now: Instant,
): Generator<string> {
  const { rows, columns } = onOneState(db, () => {
    const scheme = requireScheme(db);
    const found = listBalance(db, period, by, dayOf(now, scheme.timeZone));
    return {
      rows: found,
      columns: columnsOf(period, by, hasBalance(period, scheme.firstDay, found), ledgerHead(db)),
    };
  });
  yield csvText([columns.map((column) => column.name)]);
  for (let at = 0; at < rows.length; at += PIECE) {
    yield csvText(
      rows.slice(at, at + PIECE).map((row) => columns.map((column) => column.cell(row))),
    );
  }
}

/** W3C CSVW metadata of that file (Metadata Vocabulary for Tabular Data, 2015). */
export function describeBalance(
  db: Readable,
  period: Period,
  by: readonly Grouping[],
  url: string,
): Record<string, unknown> {
  const scheme = requireScheme(db);
  const head = ledgerHead(db);
  return {
    "@context": ["http://www.w3.org/ns/csvw", { "@language": "en" }],
    url,
    "dc:title": `${scheme.name}: mass balance, ${period.from} to ${lastDayOf(period)}`,
    "dc:identifier": exportName("balance", period, "csv"),
    "dc:temporal": `${period.from}/${lastDayOf(period)}`,
    "dc:description":
      "Every row balances to the gram: opening + collected + other_in + opening_count + resorted = disposed + passed_on + loss + difference + pieces + before_opening + closing. Figures by drop-off point are attributed by weight; no bag is traced physically.",
    "dc:source": `Ledger entry ${head.entryId}, SHA-256 ${head.hash}`,
    "dc:conformsTo": "https://www.rfc-editor.org/rfc/rfc4180",
    dialect: {
      encoding: "utf-8",
      delimiter: ",",
      header: true,
      lineTerminators: ["\r\n"],
      quoteChar: '"',
    },
    tableSchema: {
      columns: columnsOf(period, by, true, head).map((column) => ({
        name: column.name,
        titles: column.name,
        "dc:description": column.definition,
        datatype: column.datatype,
      })),
    },
  };
}
