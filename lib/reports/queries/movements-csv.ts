/** Every ledger line of a period as a CSV file. */
import "server-only";
import { csvNumber, csvText, type CsvCell } from "@/lib/core/csv";
import { kgCell } from "@/lib/core/mass";
import type { Period } from "@/lib/core/time";
import type { Readable } from "@/lib/platform/database";
import { movementBounds, pagesOfMovements, type MovementRow } from "./movements";

const COLUMNS: readonly (readonly [name: string, cell: (row: MovementRow) => CsvCell])[] = [
  ["entry", (row) => row.entryId],
  ["line", (row) => row.seq],
  ["booked_day", (row) => row.bookedDay],
  ["concerns_day", (row) => row.concernsDay],
  ["occurred_at", (row) => new Date(row.occurredAt).toISOString()],
  ["recorded_at", (row) => new Date(row.recordedAt).toISOString()],
  ["entry_kind", (row) => row.kind],
  ["subject", (row) => row.subject],
  ["reverses", (row) => row.reverses],
  ["account", (row) => row.account],
  ["cause", (row) => row.cause],
  ["holder", (row) => row.holder],
  ["polymer", (row) => row.row ?? row.polymer],
  ["kind", (row) => row.row ?? row.materialKind],
  ["colour", (row) => row.row ?? row.colourCode],
  ["form", (row) => row.form],
  ["wash", (row) => row.wash],
  ["kg", (row) => csvNumber(kgCell(row.grams))],
  ["grams", (row) => row.grams],
  ["holder_grams_after", (row) => row.afterGrams],
  ["basis", (row) => row.basis],
  ["scale", (row) => row.scale],
];

/**
 * The file's text, page by page. The last entry is fixed before the first page; between pages no
 * transaction is open, so the log of the database can be folded back while a long export runs.
 */
export function* movementsCsv(db: Readable, period: Period): Generator<string> {
  yield csvText([COLUMNS.map(([name]) => name)]);
  const bounds = movementBounds(db, period);
  if (!bounds) return;
  for (const page of pagesOfMovements(db, period, bounds)) {
    yield csvText(page.map((row) => COLUMNS.map(([, cell]) => cell(row))));
  }
}
