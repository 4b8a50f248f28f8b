/** Reads the ledger in pages as a journal; for the command line and a connection of its own. */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import { commodityDirectives, journalTransaction } from "../rules/journal";
import { ledgerHead, listEntriesAfter, loadLines } from "./entries";

const PAGE = 200;

/** The name of every row that materials have, by material. */
function rowNames(db: Readable): Map<number, string> {
  const rows = prepared(
    db.client,
    `select m.id, r.id as rowId, r.polymer, r.kind, r.colour_code as colour from materials m
     join "rows" r on r.id = m.row_id order by m.id`,
  ).all() as {
    id: number;
    rowId: number;
    polymer: string | null;
    kind: string | null;
    colour: string | null;
  }[];
  return new Map(
    rows.map((row) => [
      row.id,
      row.rowId === 1
        ? "unsorted"
        : row.rowId === 2
          ? "reject"
          : `${row.polymer}:${row.kind}:${row.colour}`,
    ]),
  );
}

/** The journal in pieces: a heading, then pages of transactions up to the head at the start. */
export function* journalPieces(db: Readable): Generator<string> {
  const head = ledgerHead(db);
  const names = rowNames(db);
  const holderName = prepared(db.client, "select code from holders where id = ?").pluck();
  yield `; Bismar ledger up to entry ${head.entryId}, hash ${head.hash}\n; amounts in kilograms; commodity = report row\n\n`;
  yield `${commodityDirectives([...new Set(names.values())])}\n`;
  for (let after = 0; ;) {
    const page = listEntriesAfter(db, after, PAGE).filter((entry) => entry.id <= head.entryId);
    if (page.length === 0) return;
    yield page
      .map((entry) =>
        journalTransaction(entry, loadLines(db, entry.id), {
          rowName: (materialId) => names.get(materialId) ?? `material-${materialId}`,
          holderName: (holderId) => String(holderName.get(holderId)),
        }),
      )
      .join("");
    after = page.at(-1)?.id ?? head.entryId;
  }
}
