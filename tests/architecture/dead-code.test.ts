/** Nothing is kept that nobody uses: files, exports, dependencies (knip). Tests count as users. */
import { execFile } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { promisify } from "node:util";
import { describe, expect, it } from "vitest";
import { PROJECT, plantTree, removeTree } from "../support/planted-tree";

type Issue = { file: string } & Record<string, { name: string }[] | string>;

/** "exports: lib/core/mass.ts (grams)" for everything that knip finds in a tree. */
async function deadCode(root: string): Promise<string[]> {
  const run = promisify(execFile)(
    process.execPath,
    [
      path.join(PROJECT, "node_modules/knip/bin/knip.js"),
      "--no-progress",
      "--no-config-hints",
      "--no-exit-code",
      "--reporter",
      "json",
    ],
    { cwd: root, maxBuffer: 64 * 1024 * 1024 },
  );
  const { stdout } = await run;
  const report = JSON.parse(stdout) as { issues: Issue[] };
  return report.issues
    .flatMap((issue) =>
      Object.entries(issue).flatMap(([kind, found]) =>
        typeof found === "string"
          ? []
          : found.map(({ name }) => `${kind}: ${issue.file} (${name})`),
      ),
    )
    .sort();
}

describe("dead code", () => {
  it("is nowhere in this project", async () => {
    expect(await deadCode(PROJECT)).toEqual([]);
  });

  it("is reported where it is planted", async () => {
    const root = plantTree({
      "knip.json": fs.readFileSync(path.join(PROJECT, "knip.json"), "utf8"),
      "lib/cli/migrate.ts": 'import { used } from "../core/words";\nconsole.log(used);\n',
      "lib/core/words.ts": "export const used = 1;\nexport const unused = 2;\n",
      "lib/core/forgotten.ts": "export const forgotten = 1;\n",
    });
    try {
      const found = await deadCode(root);
      expect(found).toContain("exports: lib/core/words.ts (unused)");
      expect(
        found.some((line) => line.startsWith("files: ") && line.includes("forgotten.ts")),
      ).toBe(true);
      expect(found.some((line) => line.startsWith("dependencies: ") && line.includes("zod"))).toBe(
        true,
      );
      expect(found.some((line) => line.includes("(used)"))).toBe(false);
    } finally {
      removeTree(root);
    }
  });
});
