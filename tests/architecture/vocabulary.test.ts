import { describe, expect, it } from "vitest";
import { PROJECT, plantTree, removeTree } from "../support/planted-tree";
import { LEAST_MODULES } from "./areas.mjs";
import { codeViolations } from "./vocabulary/code-rules";
import { nameViolations } from "./vocabulary/name-rules";
import { INNOCENT_FILES, PLANTED_VIOLATIONS } from "./vocabulary/planted-violations";
import { isCode, sourceFiles, type SourceFile, type Violation } from "./vocabulary/source-files";
import { textViolations } from "./vocabulary/text-rules";

function violations(files: SourceFile[], longFiles?: Record<string, string>): Violation[] {
  return [...nameViolations(files), ...textViolations(files, longFiles), ...codeViolations(files)];
}

const shown = ({ rule, file, detail }: Violation) => `${rule}: ${file} (${detail})`;

describe("the vocabulary", () => {
  it("is kept everywhere in this project", () => {
    const files = sourceFiles(PROJECT);
    expect(files.filter((file) => isCode(file.name)).length).toBeGreaterThanOrEqual(LEAST_MODULES);
    expect(violations(files).map(shown)).toEqual([]);
  });

  it("finds nothing in files that keep it", () => {
    const root = plantTree(INNOCENT_FILES);
    try {
      expect(violations(sourceFiles(root), {}).map(shown)).toEqual([]);
    } finally {
      removeTree(root);
    }
  });

  it.each(PLANTED_VIOLATIONS)("reports $rule in $file", ({ rule, file, content }) => {
    const root = plantTree({ [file]: content });
    try {
      const found = violations(sourceFiles(root), {}).filter(
        (violation) => violation.file === file,
      );
      expect(found.map((violation) => violation.rule)).toContain(rule);
    } finally {
      removeTree(root);
    }
  });

  it("reports a long file's entry that is no longer needed", () => {
    const root = plantTree({ "lib/core/short.ts": "export {};\n" });
    try {
      const found = violations(sourceFiles(root), {
        "lib/core/short.ts": "was long",
        "gone.ts": "",
      });
      expect(found.map(shown)).toEqual([
        "long-files-list: lib/core/short.ts (has 1 lines)",
        "long-files-list: gone.ts (does not exist)",
      ]);
    } finally {
      removeTree(root);
    }
  });
});
