/**
 * The journal against hledger, an accounting program of its own: it must accept every transaction without
 * converting one commodity into another, and its balances must be the database's.
 */
import { spawnSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { kgCell } from "@/lib/core/mass";
import type { Draft } from "@/lib/ledger/commands/post";
import { journalPieces } from "@/lib/ledger/queries/journal";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { ledgerOf } from "@/tests/support/ledger-bench";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const present = spawnSync("hledger", ["--version"]).status === 0;

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
});
afterEach(() => scheme.close());

/** A history with everything that changes rows: sorting, a step, a run of two colours, a correction. */
function history(): void {
  const ledger = ledgerOf(scheme);
  const bags = ["AAAAAAAA", "BBBBBBBB"].map((code) => ledger.holder("bag", code));
  const lots = ["LOT00001", "LOT00002", "LOT00003"].map((code) => ledger.holder("lot", code));
  const run = ledger.holder("run", "RUN00001");
  const bin = ledger.holder("reject-bin", "REJECT-BIN-1");
  const batch = ledger.holder("batch", "BATCH001");
  const [blue, white, mix] = [
    ledger.material("blue"),
    ledger.material("white"),
    ledger.material("mixed", "flake", "regrind"),
  ];
  const draft = (kind: Draft["kind"], lines: Draft["lines"]): Draft => ({
    kind,
    occurredAt: NOON,
    subject: `test:${kind}`,
    lines,
  });
  const origins = ["point-a", "point-b"].map((name) => ledger.origin(name));
  bags.forEach((holderId, index) =>
    ledger.post(
      draft("weigh-in", [
        { account: "source", originNo: origins[index] ?? 0, materialId: UNSORTED, grams: -3001 },
        { account: "bag", holderId, materialId: UNSORTED, grams: 3001 },
      ]),
    ),
  );
  const [bagA = 0, bagB = 0] = bags;
  const [lot1 = 0, lot2 = 0, lot3 = 0] = lots;
  const sort = (bag: number, blueGrams: number, whiteGrams: number): Draft =>
    draft("sort", [
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: -3001 },
      { account: "lot", holderId: lot1, materialId: blue, grams: blueGrams },
      { account: "lot", holderId: lot2, materialId: white, grams: whiteGrams },
      {
        account: "reject-bin",
        holderId: bin,
        materialId: REJECT,
        grams: 3001 - blueGrams - whiteGrams - 7,
      },
      { account: "difference", grams: 7 },
    ]);
  const first = ledger.post(sort(bagA, 1500, 1300));
  ledger.post(sort(bagB, 900, 1900));
  ledger.post(
    draft("draw", [
      { account: "lot", holderId: lot1, materialId: blue, grams: -2300 },
      { account: "lot", holderId: lot2, materialId: white, grams: -1100 },
      { account: "run", holderId: run, materialId: blue, grams: 2300 },
      { account: "run", holderId: run, materialId: white, grams: 1100 },
    ]),
  );
  ledger.post(
    draft("finish", [
      { account: "run", holderId: run, materialId: blue, grams: -2300 },
      { account: "run", holderId: run, materialId: white, grams: -1100 },
      { account: "pieces", holderId: batch, materialId: blue, grams: 2611 },
      { account: "lot", holderId: lot3, materialId: mix, grams: 640 },
      { account: "loss", cause: "spilled", grams: 101 },
      { account: "reject-bin", holderId: bin, materialId: REJECT, grams: 48 },
    ]),
  );
  ledger.correct(first.actId, sort(bagA, 1000, 1300));
}

describe("the journal", () => {
  it.runIf(present)("is accepted by hledger, and every balance agrees", () => {
    history();
    const file = path.join(process.env.BISMAR_TEST_FOLDER ?? "", `journal-${process.pid}.journal`);
    fs.writeFileSync(file, [...journalPieces(scheme.db.reader)].join(""));
    const hledger = (...args: string[]) => {
      const run = spawnSync("hledger", ["-f", file, ...args], { encoding: "utf8" });
      expect(run.stderr).toBe("");
      expect(run.status).toBe(0);
      return run.stdout;
    };
    hledger("check", "balancednoautoconversion");
    hledger("check", "commodities");

    const balances = new Map<string, string>();
    const csv = hledger("bal", "shed", "pieces", "-O", "csv", "--layout=bare", "--depth=10");
    for (const row of csv.trim().split("\n").slice(1)) {
      const [account = "", commodity = "", amount = ""] = row
        .split(",")
        .map((cell) => cell.replace(/^"|"$/g, ""));
      if (account !== "total" && account !== "Total:")
        balances.set(`${account}|${commodity}`, amount);
    }
    const stored = scheme.db.reader.client
      .prepare(
        `select case when h.kind = 'batch' then 'pieces' else 'shed:' || h.kind end || ':' || h.code || ':origin-' || p.key
           || '|' || case r.id when 1 then 'unsorted' when 2 then 'reject' else r.polymer || ':' || r.kind || ':' || r.colour_code end as name,
           sum(p.grams) as grams
         from parts p join holders h on h.id = p.holder_id join materials m on m.id = p.material_id
         join "rows" r on r.id = m.row_id where p.dim = 'O' group by 1`,
      )
      .all() as { name: string; grams: number }[];
    expect(stored.length).toBeGreaterThan(6);
    expect(Object.fromEntries(balances)).toEqual(
      Object.fromEntries(stored.map(({ name, grams }) => [name, kgCell(grams)])),
    );

    const resorted = new Map<string, string>();
    for (const row of hledger("bal", "re-sorted", "-O", "csv", "--layout=bare", "--depth=1")
      .trim()
      .split("\n")
      .slice(1)) {
      const [account, commodity = "", amount = ""] = row
        .split(",")
        .map((cell) => cell.replace(/^"|"$/g, ""));
      if (account === "re-sorted") resorted.set(commodity, amount);
    }
    const column = scheme.db.reader.client
      .prepare(
        `select case r.id when 1 then 'unsorted' when 2 then 'reject' else r.polymer || ':' || r.kind || ':' || r.colour_code end as name,
           -sum(held - collected - other_in - opening + disposed + passed_proven + passed_unproven + loss + difference + pieces) as grams
         from totals_day t join "rows" r on r.id = t.row_id group by 1 having grams <> 0`,
      )
      .all() as { name: string; grams: number }[];
    expect(Object.fromEntries(resorted)).toEqual(
      Object.fromEntries(column.map(({ name, grams }) => [name, kgCell(grams)])),
    );
  });
});
