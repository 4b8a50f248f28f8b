/** Every path that the documents name exists, and every `npm run` they name is a script. */
import fs from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { PROJECT, plantTree, removeTree } from "../support/planted-tree";

const DOCUMENTS = ["README.md", "DEVELOPERS.md", "CHANGELOG.md", "fixtures/README.md"];
/** What begins like a path of the tree, and files of the top level by their kind. */
const PATH =
  /^(?:(?:app|components|db|fixtures|lib|public|tests|\.ci)\/.+|[\w.-]+\.(?:mjs|json|md)|(?:proxy|instrumentation|[\w-]+\.config)\.ts)$/;

/** Words in backticks and targets of links that are paths. */
function namedPaths(text: string): string[] {
  const spans = [...text.matchAll(/`([^`\n]+)`/g)].flatMap((match) =>
    (match[1] ?? "").split(/\s+/),
  );
  const links = [...text.matchAll(/\]\((?:\.?\/)?([^)\s#]+)/g)].map((match) => match[1] ?? "");
  return [...spans, ...links].filter((word) => PATH.test(word) && !word.includes("://"));
}

/** Made by running the program, so not there in a fresh clone. */
const MADE = /^(data|\.cache|\.next)\//;

/** "lib/<area>/rules.ts", "app/b/[code]" and "lib/{a,b}.ts" as patterns of a path. */
function exists(root: string, name: string): boolean {
  const clean = name.replace(/[.,:;]+$/, "").replace(/\/$/, "");
  if (MADE.test(clean) || /[<>{}*…]/.test(clean)) return true;
  return fs.existsSync(path.join(root, clean));
}

function missingPaths(root: string): string[] {
  const scripts = Object.keys(
    (
      JSON.parse(fs.readFileSync(path.join(root, "package.json"), "utf8")) as {
        scripts: Record<string, string>;
      }
    ).scripts,
  );
  return DOCUMENTS.flatMap((document) => {
    const file = path.join(root, document);
    if (!fs.existsSync(file)) return [];
    const text = fs.readFileSync(file, "utf8");
    const paths = namedPaths(text).filter(
      (name) => !exists(root, name) && !exists(root, path.join(path.dirname(document), name)),
    );
    const runs = [...text.matchAll(/npm run ([a-z][\w:-]*)/g)]
      .map((match) => match[1] ?? "")
      .filter((script) => !scripts.includes(script))
      .map((script) => `npm run ${script}`);
    return [...paths, ...runs].map((name) => `${document}: ${name}`);
  });
}

describe("the documents", () => {
  it("name only what exists", () => {
    expect(missingPaths(PROJECT)).toEqual([]);
  });

  it("name the source of every table of published values", () => {
    const listed = fs.readFileSync(path.join(PROJECT, "fixtures/README.md"), "utf8");
    const tables = fs.readdirSync(path.join(PROJECT, "fixtures/reference"));
    expect(tables.length).toBeGreaterThan(3);
    expect(tables.filter((table) => !listed.includes(`fixtures/reference/${table}`))).toEqual([]);
  });

  it("would be caught naming what does not", () => {
    const root = plantTree({
      "README.md":
        "See `lib/core/mass.ts`, `lib/core/gone.ts`, [rules](lib/points/rules.ts), `lib/<area>/rules.ts`,\n" +
        "`app/(shed)/gone/page.tsx`, `rules.ts`, [a page](https://example.org/lib/x.ts),\n" +
        "`data/demo.db`, `missing.mjs`; `npm run demo`, `npm run fly`.\n",
      "lib/core/mass.ts": "export {};\n",
    });
    try {
      expect(missingPaths(root)).toEqual([
        "README.md: lib/core/gone.ts",
        "README.md: app/(shed)/gone/page.tsx",
        "README.md: missing.mjs",
        "README.md: lib/points/rules.ts",
        "README.md: npm run fly",
      ]);
    } finally {
      removeTree(root);
    }
  });
});
