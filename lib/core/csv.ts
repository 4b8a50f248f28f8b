/**
 * CSV by RFC 4180 in UTF-8, with cells that a spreadsheet would run as a formula defused: text that
 * begins with = + - @, a tab or a line end gets a leading apostrophe (OWASP, CSV Injection).
 * Numbers stay numbers: pass them as {@link CsvNumber}, and a minus sign is left alone.
 */
import Papa from "papaparse";

/** A cell that already is a plain decimal number, such as the result of kgCell(). */
export type CsvNumber = { readonly number: string };
export type CsvCell = string | number | CsvNumber | null;

const FORMULA = /^[=+\-@\t\r\n\0]/;

/** @throws RangeError when the text is not a plain decimal number */
export function csvNumber(text: string): CsvNumber {
  if (!/^-?\d+(\.\d+)?$/.test(text)) throw new RangeError(`${text} is not a plain number`);
  return { number: text };
}

function plain(cell: CsvCell): string {
  if (cell === null) return "";
  if (typeof cell === "number") return String(cell);
  if (typeof cell === "object") return cell.number;
  return FORMULA.test(cell) ? `'${cell}` : cell;
}

/** Rows to text, each record ended by CRLF. */
export function csvText(rows: readonly (readonly CsvCell[])[]): string {
  if (rows.length === 0) return "";
  return `${Papa.unparse(
    rows.map((row) => row.map(plain)),
    { newline: "\r\n", escapeFormulae: false },
  )}\r\n`;
}
