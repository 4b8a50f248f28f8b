/** The strict rules are on for every kind of file: a rule that was switched off by accident is silent. */
import path from "node:path";
import { ESLint } from "eslint";
import { describe, expect, it } from "vitest";
import { PROJECT, plantTree, removeTree } from "../support/planted-tree";

const ALWAYS_ERRORS = [
  "@typescript-eslint/no-explicit-any",
  "@typescript-eslint/no-floating-promises",
  "@typescript-eslint/no-misused-promises",
  "@typescript-eslint/no-unsafe-assignment",
  "@typescript-eslint/no-unused-vars",
  "@typescript-eslint/ban-ts-comment",
];

describe("lint rules", () => {
  const eslint = new ESLint({ cwd: PROJECT });

  it.each([
    "lib/core/mass.ts",
    "app/page.tsx",
    "components/ui/button.tsx",
    "tests/unit/core/mass.test.ts",
  ])("are errors in %s", async (file) => {
    const config = (await eslint.calculateConfigForFile(path.join(PROJECT, file))) as {
      rules: Record<string, [number]>;
    };
    for (const rule of ALWAYS_ERRORS) expect(config.rules[rule]?.[0], rule).toBe(2);
  });

  it("report any in a piece of code", async () => {
    // In a tree of its own: the types of the whole project are read by the lint step.
    const root = plantTree({
      "planted.ts": "export const loose: any = 1;\nasync function go() {}\ngo();\n",
    });
    try {
      const strict = new ESLint({
        cwd: root,
        overrideConfigFile: path.join(PROJECT, "eslint.config.mjs"),
        overrideConfig: { languageOptions: { parserOptions: { tsconfigRootDir: root } } },
      });
      const [result] = await strict.lintFiles(["planted.ts"]);
      const rules = result?.messages.map((message) => message.ruleId);
      expect(rules).toContain("@typescript-eslint/no-explicit-any");
      expect(rules).toContain("@typescript-eslint/no-floating-promises");
    } finally {
      removeTree(root);
    }
  });
});
