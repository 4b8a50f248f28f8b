/** The project's own files, as the vocabulary rules read them. */
import fs from "node:fs";
import path from "node:path";

export type SourceFile = { name: string; text: string };
export type Violation = { rule: string; file: string; detail: string };

const SKIPPED = new Set([
  "node_modules",
  ".next",
  ".git",
  ".cache",
  "data",
  "coverage",
  "test-results",
  "playwright-report",
]);
const GENERATED = new Set(["next-env.d.ts", "package-lock.json"]);
const READ = /\.(ts|tsx|mts|mjs|css|sql|json|md|csv|svg|html)$|^\.ci\/run$/;

/** Every text file of the project below a folder, generated ones left out; paths with slashes. */
export function sourceFiles(root: string): SourceFile[] {
  const found: SourceFile[] = [];
  const walk = (folder: string): void => {
    for (const entry of fs.readdirSync(path.join(root, folder), { withFileTypes: true })) {
      const name = folder === "" ? entry.name : `${folder}/${entry.name}`;
      if (SKIPPED.has(entry.name) || GENERATED.has(name) || entry.isSymbolicLink()) continue;
      if (entry.isDirectory()) walk(name);
      else if (READ.test(name)) {
        found.push({ name, text: fs.readFileSync(path.join(root, name), "utf8") });
      }
    }
  };
  walk("");
  return found.sort((a, b) => (a.name < b.name ? -1 : 1));
}

/** TypeScript or plain Node code, and no configuration of a tool. */
export function isCode(name: string): boolean {
  return /\.(ts|tsx|mts|mjs)$/.test(name);
}
