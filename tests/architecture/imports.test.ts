import { execFile } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { promisify } from "node:util";
import { describe, expect, it } from "vitest";
import { PROJECT, plantTree, removeTree } from "../support/planted-tree";
import { LEAST_MODULES } from "./areas.mjs";
import { IMPORT_RULES } from "./import-rules.mjs";
import { ALLOWED_IMPORTS, PLANTED_IMPORTS } from "./planted-imports";

type Report = {
  modules: { source: string }[];
  summary: { violations: { from: string; to: string; rule: { name: string } }[] };
};

const FOLDERS = ["app", "components", "db", "lib", "tests", "proxy.ts", "instrumentation.ts"];

/** Reads a tree with the project's rules. */
async function cruise(root: string): Promise<{ own: string[]; violations: string[] }> {
  const { stdout } = await promisify(execFile)(
    process.execPath,
    [
      path.join(PROJECT, "node_modules/dependency-cruiser/bin/dependency-cruise.mjs"),
      "--config",
      path.join(PROJECT, ".dependency-cruiser.mjs"),
      "--output-type",
      "json",
      ...FOLDERS.filter((folder) => fs.existsSync(path.join(root, folder))),
    ],
    { cwd: root, maxBuffer: 256 * 1024 * 1024 },
  );
  const report = JSON.parse(stdout) as Report;
  const own = report.modules
    .map((module) => module.source)
    .filter((source) => /^(app|components|db|lib|tests)\/|^[a-z-]+\.ts$/.test(source));
  const violations = report.summary.violations.map(
    ({ rule, from, to }) =>
      `${rule.name}: ${from}${from === to ? "" : ` → ${to.replace(/^.*node_modules\//, "")}`}`,
  );
  return { own, violations };
}

describe("who may import whom", () => {
  it("finds nothing in this project, having read all of it", async () => {
    const { own, violations } = await cruise(PROJECT);
    expect(violations).toEqual([]);
    expect(own.length).toBeGreaterThanOrEqual(LEAST_MODULES);
  });

  it("would fail on a tree that holds nothing", async () => {
    const root = plantTree({ "lib/core/lonely.ts": "export const lonely = 1;\n" });
    try {
      const { own } = await cruise(root);
      expect(own.length).toBeLessThan(LEAST_MODULES);
    } finally {
      removeTree(root);
    }
  });

  it("reports a planted violation of every rule, and nothing that is allowed", async () => {
    const files: Record<string, string> = { ...ALLOWED_IMPORTS };
    for (const plant of PLANTED_IMPORTS) {
      files[plant.file] = plant.content;
    }
    const root = plantTree(files);
    try {
      const { violations } = await cruise(root);
      for (const plant of PLANTED_IMPORTS) {
        for (const rule of plant.rules) {
          expect(
            violations.some((line) => line.startsWith(`${rule}: ${plant.file}`)),
            `${rule} in ${plant.file}`,
          ).toBe(true);
        }
      }
      const planted = new Set(PLANTED_IMPORTS.map((plant) => plant.file));
      const innocent = violations.filter(
        (line) => !planted.has((line.split(": ")[1] ?? "").split(" → ")[0] ?? ""),
      );
      expect(innocent).toEqual([]);

      const proven = new Set(violations.map((line) => line.split(":")[0]));
      const areaOrder = (name: string) => name.startsWith("4-area-order-");
      const unproven = IMPORT_RULES.map((rule) => rule.name).filter(
        (name) => !proven.has(name) && !areaOrder(name),
      );
      expect(unproven).toEqual([]);
      expect([...proven].some((name) => name !== undefined && areaOrder(name))).toBe(true);
    } finally {
      removeTree(root);
    }
  });
});
