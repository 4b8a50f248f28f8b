/**
 * Symbol sizes and alphanumeric capacities at level Q against ISO/IEC 18004's figures as published by
 * scan2d.com and docs.real.com (fixtures/reference/qr_capacity.csv names the source of each row).
 */
import fs from "node:fs";
import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { qrSymbol } from "@/lib/bags/rules/qr";

type Row = { version: string; modules: string; ecc: string; alphanumeric: string; source: string };
const { data } = Papa.parse<Row>(fs.readFileSync("fixtures/reference/qr_capacity.csv", "utf8"), {
  header: true,
  skipEmptyLines: true,
});
const rows = data.filter((row) => row.ecc === "Q");

describe("QR symbols at level Q", () => {
  it("has versions 1 to 5 to compare, each with its source", () => {
    expect(rows.map((row) => row.version)).toEqual(["1", "2", "3", "4", "5"]);
    expect(rows.every((row) => row.source.length > 0)).toBe(true);
  });

  it.each(rows)("version $version takes $alphanumeric symbols and no more", (row) => {
    // A letter throughout, so that no run of figures is packed tighter.
    const full = qrSymbol("A".repeat(Number(row.alphanumeric)));
    expect(full).toMatchObject({ version: Number(row.version), modules: Number(row.modules) });
    expect(qrSymbol("A".repeat(Number(row.alphanumeric) + 1)).version).toBe(
      Number(row.version) + 1,
    );
  });
});
