/** A small project in a temporary folder, for proving that a checker sees what it is meant to see. */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";

export const PROJECT = path.resolve(import.meta.dirname, "../..");

/**
 * @param files path in the tree → content
 * @returns the folder; the caller removes it with {@link removeTree}
 */
export function plantTree(files: Readonly<Record<string, string>>): string {
  const root = fs.realpathSync(fs.mkdtempSync(path.join(os.tmpdir(), "bismar-planted-")));
  for (const name of ["package.json", "tsconfig.json"]) {
    fs.copyFileSync(path.join(PROJECT, name), path.join(root, name));
  }
  fs.symlinkSync(path.join(PROJECT, "node_modules"), path.join(root, "node_modules"), "junction");
  for (const [name, content] of Object.entries(files)) {
    const file = path.join(root, name);
    fs.mkdirSync(path.dirname(file), { recursive: true });
    fs.writeFileSync(file, content);
  }
  return root;
}

export function removeTree(root: string): void {
  fs.rmSync(root, { recursive: true, force: true });
}
