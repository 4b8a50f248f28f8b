import Papa from "papaparse";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { day } from "@/lib/core/time";
import { ledgerHead } from "@/lib/ledger/queries/entries";
import {
  exportBalance,
  exportMovements,
  getBalanceDescription,
} from "@/lib/reports/queries/exports";
import { MOVEMENTS_SQL } from "@/lib/reports/queries/movements";
import { closeSorting } from "@/lib/sorting/commands/close";
import { newShed, noonOf, sorting, type Shed } from "../../support/shed";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => shed.close());

const MAY = { from: day("2026-05-01"), until: day("2026-06-01") };

function sortBags(count: number): void {
  for (let at = 0; at < count; at += 1) {
    const bag = shed.weigh(1000 + at * 5, { at: noonOf("2026-05-04"), point: at % 3 });
    closeSorting(
      shed.ctx("volunteer"),
      sorting(shed, bag, {
        piles: [{ grams: 900 + at * 5, colour: at % 2 ? "blue" : "white" }],
        rejects: [{ grams: 95 }],
      }),
    );
  }
}

async function textOf(stream: ReadableStream<Uint8Array>): Promise<string> {
  return new Response(stream).text();
}

type Row = Record<string, string>;

function parse(csv: string): Row[] {
  const parsed = Papa.parse<Row>(csv, { header: true, skipEmptyLines: false });
  expect(parsed.errors.filter((error) => error.type !== "FieldMismatch")).toEqual([]);
  return parsed.data.filter((row) => Object.values(row).some((cell) => cell !== ""));
}

const total = (rows: readonly Row[], column: string): number =>
  rows.reduce((sum, row) => sum + Number(row[column]), 0);

const linesSum = (where: string): number =>
  shed.db.reader.client
    .prepare(`select coalesce(sum(grams), 0) from lines where ${where}`)
    .pluck()
    .get() as number;

describe("balance.csv", () => {
  it("adds up to the ledger's lines to the gram, kilograms and grams alike", async () => {
    sortBags(12);
    const csv = await textOf(
      exportBalance(shed.ctx("coordinator"), { ...MAY, by: ["point", "polymer", "colour"] }),
    );
    expect(csv.endsWith("\r\n")).toBe(true);
    expect(
      csv
        .split("\r\n")
        .slice(0, -1)
        .some((line) => line.includes("\n")),
    ).toBe(false);
    const rows = parse(csv);
    expect(total(rows, "collected_g")).toBe(-linesSum("account = 'source'"));
    expect(total(rows, "accepted_g")).toBe(linesSum("account = 'lot'"));
    expect(total(rows, "rejected_g")).toBe(linesSum("account = 'reject-bin'"));
    expect(total(rows, "difference_g")).toBe(linesSum("account = 'difference'"));
    expect(total(rows, "closing_g")).toBe(linesSum("account in ('bag', 'lot', 'reject-bin')"));
    expect(total(rows, "resorted_g")).toBe(0);
    for (const row of rows) {
      expect(row.collected_kg).toMatch(/^-?\d+\.\d{3}$/);
      expect(Math.round(Number(row.collected_kg) * 1000)).toBe(Number(row.collected_g));
    }
    const head = ledgerHead(shed.db.reader);
    expect(rows[0]).toMatchObject({
      period_from: "2026-05-01",
      period_to: "2026-05-31",
      ledger_entry: String(head.entryId),
      ledger_hash: head.hash,
    });
  });

  it("is described column by column by its CSVW metadata", async () => {
    sortBags(2);
    const input = { ...MAY, by: ["month" as const, "point" as const] };
    const csv = await textOf(exportBalance(shed.ctx("coordinator"), input));
    const header = csv.slice(0, csv.indexOf("\r\n")).split(",");
    const described = getBalanceDescription(shed.ctx("coordinator"), input) as {
      url: string;
      tableSchema: { columns: { name: string; datatype: string; "dc:description": string }[] };
    };
    expect(described.tableSchema.columns.map((column) => column.name)).toEqual(header);
    expect(
      described.tableSchema.columns.every((column) => column["dc:description"].length > 10),
    ).toBe(true);
    expect(described.url).toBe("balance.csv?from=2026-05-01&until=2026-06-01&by=month%2Cpoint");
  });

  it("defuses a point's name that a spreadsheet would run", async () => {
    shed.db.writer.client
      .prepare('update points set name = \'=HYPERLINK("x"),"y"\' where id = ?')
      .run(shed.points[0]);
    sortBags(1);
    const rows = parse(
      await textOf(exportBalance(shed.ctx("coordinator"), { ...MAY, by: ["point"] })),
    );
    expect(rows.map((row) => row.point)).toContain('\'=HYPERLINK("x"),"y"');
  });
});

describe("movements.csv", () => {
  it("holds every line once, in order, and each entry sums to zero", async () => {
    sortBags(20);
    const rows = parse(await textOf(exportMovements(shed.ctx("coordinator"), MAY)));
    expect(rows).toHaveLength(
      shed.db.reader.client.prepare("select count(*) from lines").pluck().get() as number,
    );
    const byEntry = new Map<string, number>();
    for (const row of rows) {
      byEntry.set(row.entry ?? "", (byEntry.get(row.entry ?? "") ?? 0) + Number(row.grams));
      expect(Math.round(Number(row.kg) * 1000)).toBe(Number(row.grams));
    }
    expect([...byEntry.values()].every((sum) => sum === 0)).toBe(true);
    expect(
      rows.filter((row) => row.account === "lot").every((row) => row.polymer === "PE-HD"),
    ).toBe(true);
  });

  it("ends at the entry that was the last when it began", async () => {
    sortBags(400);
    const reader = exportMovements(shed.ctx("coordinator"), MAY).getReader();
    const decoder = new TextDecoder();
    let csv = "";
    let pieces = 0;
    for (;;) {
      const { done, value } = await reader.read();
      if (done) break;
      csv += decoder.decode(value, { stream: true });
      pieces += 1;
      // The header is the first piece; once the first lines are here the end is fixed.
      if (pieces === 2) sortBags(3);
    }
    expect(pieces).toBeGreaterThan(3);
    expect(parse(csv).at(-1)?.entry).toBe("800");
  });

  it("is empty but for its header when nothing was booked, and can be left half read", async () => {
    const csv = await textOf(exportMovements(shed.ctx("coordinator"), MAY));
    expect(csv.split("\r\n")).toHaveLength(2);
    sortBags(250);
    const reader = exportMovements(shed.ctx("coordinator"), MAY).getReader();
    await reader.read();
    await expect(reader.cancel()).resolves.toBeUndefined();
  });

  it("fails aloud when its worker fails", async () => {
    const gone = { ...shed.ctx("coordinator"), db: { ...shed.db, file: "/nowhere/at/all.db" } };
    await expect(textOf(exportMovements(gone, MAY))).rejects.toThrow();
  });

  it("walks lines by their key", () => {
    const plan = shed.db.reader.client
      .prepare(`explain query plan ${MOVEMENTS_SQL}`)
      .all({ entryId: 1, seq: 1, last: 9, from: "a", until: "b" }) as { detail: string }[];
    const text = plan.map((row) => row.detail).join("\n");
    expect(text).toMatch(
      /SEARCH n USING PRIMARY KEY \(\(entry_id,seq\)>\(\?,\?\)|SEARCH n USING PRIMARY KEY \(entry_id/,
    );
    expect(text).not.toMatch(/SCAN|TEMP B-TREE/);
  });

  it("is for coordinators only", () => {
    expect(() => exportMovements(shed.ctx("lead"), MAY)).toThrow("forbidden");
    expect(() => exportBalance(shed.ctx("volunteer"), { ...MAY, by: [] })).toThrow("forbidden");
  });
});
