/**
 * The ledger as a plain-text journal that hledger reads.
 *
 * Invariant: every transaction balances in every commodity by itself. A commodity is a report's row, the
 * origin is in the account's name, and what changes rows posts to `re-sorted` in both commodities, so that
 * no commodity is ever converted into another and re-sorted's balance is the report's column with its sign
 * turned.
 */
import { kgCell } from "@/lib/core/mass";
import type { Line } from "./split";

export type JournalNaming = {
  /** "PE-HD:lids:blue", "unsorted", "reject" */
  rowName: (materialId: number) => string;
  /** The holder's code. */
  holderName: (holderId: number) => string;
};

const IN_THE_SHED = new Set(["bag", "lot", "run", "reject-bin"]);

/** Commodity names hold digits and colons, so hledger wants them in quotes. */
export function commodity(row: string): string {
  return `"${row.replaceAll('"', "")}"`;
}

/** One line for each commodity, before any transaction. */
export function commodityDirectives(rows: readonly string[]): string {
  return rows.map((row) => `commodity 1000.000 ${commodity(row)}\n`).join("");
}

function accountName(line: Line, naming: JournalNaming): string {
  const holder = line.holderId === null ? "" : `:${naming.holderName(line.holderId)}`;
  const cause = line.cause === null ? "" : `:${line.cause}`;
  return `${IN_THE_SHED.has(line.account) ? "shed:" : ""}${line.account}${holder}${cause}`;
}

/**
 * One entry as one transaction.
 *
 * @returns text that ends with an empty line
 */
export function journalTransaction(
  entry: {
    id: number;
    actId: number;
    kind: string;
    bookedDay: string;
    subject: string;
    hash: string;
  },
  lines: readonly Line[],
  naming: JournalNaming,
): string {
  const postings: string[] = [];
  const open = new Map<string, { row: string; originNo: number; grams: number }>();
  for (const line of lines) {
    const row = naming.rowName(line.materialId);
    for (const [originNo, grams] of line.parts.O) {
      postings.push(posting(`${accountName(line, naming)}:origin-${originNo}`, grams, row));
      const key = `${row}|${originNo}`;
      const sum = open.get(key) ?? { row, originNo, grams: 0 };
      sum.grams += grams;
      open.set(key, sum);
    }
  }
  for (const { row, originNo, grams } of open.values()) {
    if (grams !== 0) postings.push(posting(`re-sorted:origin-${originNo}`, -grams, row));
  }
  return `${entry.bookedDay} (${entry.id}) ${entry.kind} ; act:${entry.actId}, subject:${entry.subject}, hash:${entry.hash}\n${postings.join("")}\n`;
}

function posting(account: string, grams: number, row: string): string {
  return `    ${account}  ${kgCell(grams)} ${commodity(row)}\n`;
}
