/**
 * Invariant: each figure stands twice, as a plain decimal number of kilograms with three decimals and as whole
 * grams; both are numbers to a spreadsheet. Names and definitions of columns are written once, here, for the
 * file and for its description.
 */
import { csvNumber, type CsvCell } from "@/lib/core/csv";
import { kgCell } from "@/lib/core/mass";
import type { Figures } from "./balance";

type Datatype = "string" | "decimal" | "integer" | "date" | "gYearMonth";

export type CsvColumn<Row> = {
  name: string;
  definition: string;
  datatype: Datatype;
  cell: (row: Row) => CsvCell;
};

/** The balance's figures: the definitions of product.md and ledger.md in one sentence each. */
export const FIGURE_COLUMNS: readonly { key: keyof Figures; name: string; definition: string }[] = [
  { key: "opening", name: "opening", definition: "In the shed before the first day, in this row." },
  {
    key: "collected",
    name: "collected",
    definition: "Net of donated bags weighed in, by weigh-in day.",
  },
  {
    key: "otherIn",
    name: "other_in",
    definition: "What came in and was not donated: other collectors, scrap, bought in, additives.",
  },
  {
    key: "openingCount",
    name: "opening_count",
    definition: "Counted in on the scheme's first day.",
  },
  {
    key: "resorted",
    name: "resorted",
    definition:
      "What sorting and other work moved into this row from other rows; adds up to zero over all rows.",
  },
  { key: "disposed", name: "disposed", definition: "Taken away to disposal." },
  {
    key: "passedProven",
    name: "passed_on_proven",
    definition: "Passed on to another recycler, with the receiver's receipt.",
  },
  {
    key: "passedUnproven",
    name: "passed_on_unproven",
    definition: "Passed on to another recycler, without a receipt yet.",
  },
  {
    key: "loss",
    name: "loss",
    definition: "Lost for a named cause: liquid, dirt, metal, moisture, dust, cuttings, spilled.",
  },
  {
    key: "difference",
    name: "difference",
    definition: "Weighing and count differences; positive when the book held more than was found.",
  },
  {
    key: "pieces",
    name: "pieces",
    definition: "Mass of good pieces made, less pieces taken back.",
  },
  {
    key: "beforeOpening",
    name: "before_opening",
    definition:
      "Of what was collected: history from before the scheme's first day, which is outside the balance.",
  },
  {
    key: "closing",
    name: "closing",
    definition:
      "In the shed after the last day: opening + collected + other_in + opening_count + resorted - disposed - passed_on - loss - difference - pieces - before_opening.",
  },
  {
    key: "accepted",
    name: "accepted",
    definition:
      "What sorting put into lots, by sorting day, less what later left a lot as reject. Part of resorted.",
  },
  {
    key: "rejected",
    name: "rejected",
    definition: "What was put into the reject bin. Part of resorted.",
  },
  { key: "diverted", name: "diverted", definition: "pieces + passed_on_proven." },
];

/** Columns whose figure has no meaning where the shed's book does not reach. */
const BALANCE_ONLY: readonly (keyof Figures)[] = ["opening", "closing", "resorted"];

/**
 * Kilograms, then grams of every figure, and the number of bags.
 *
 * @param hasBalance false for a period with history from before the first day: its balance stays empty
 */
export function figureColumns<Row>(
  figuresOf: (row: Row) => Figures,
  hasBalance: boolean,
): CsvColumn<Row>[] {
  const shown = (key: keyof Figures): boolean => hasBalance || !BALANCE_ONLY.includes(key);
  return [
    ...FIGURE_COLUMNS.map(({ key, name, definition }): CsvColumn<Row> => ({
      name: `${name}_kg`,
      definition: `${definition} Kilograms.`,
      datatype: "decimal",
      cell: (row) => (shown(key) ? csvNumber(kgCell(figuresOf(row)[key])) : null),
    })),
    ...FIGURE_COLUMNS.map(({ key, name, definition }): CsvColumn<Row> => ({
      name: `${name}_g`,
      definition: `${definition} Grams.`,
      datatype: "integer",
      cell: (row) => (shown(key) ? figuresOf(row)[key] : null),
    })),
    {
      name: "bags",
      definition: "Bags weighed in. They count in the row of unsorted plastic.",
      datatype: "integer",
      cell: (row) => figuresOf(row).bags,
    },
  ];
}
