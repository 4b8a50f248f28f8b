/** A table of published values in fixtures/reference, read by its column names. */
import fs from "node:fs";
import path from "node:path";
import Papa from "papaparse";

const FOLDER = path.resolve(import.meta.dirname, "../../fixtures/reference");

/**
 * @param name file name without .csv
 * @returns its rows, every cell as text
 * @throws Error when the file does not parse, is empty, or a row has no `mark` that tells how far it can be believed
 */
export function referenceTable(name: string): Record<string, string>[] {
  const text = fs.readFileSync(path.join(FOLDER, `${name}.csv`), "utf8");
  const { data, errors } = Papa.parse<Record<string, string>>(text, {
    header: true,
    skipEmptyLines: true,
  });
  if (errors[0]) throw new Error(`${name}.csv: ${errors[0].message}`);
  if (data.length === 0) throw new Error(`${name}.csv holds no row`);
  if (data.some((row) => !row.mark)) throw new Error(`${name}.csv: a row without a mark`);
  return data;
}
