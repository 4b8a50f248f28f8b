/** Where a file may stand and what it may be called. */
import { AREAS, AREA_EXTRAS, AREA_FILES, EDGES } from "../areas.mjs";
import { isCode, type SourceFile, type Violation } from "./source-files";

const TOP_FOLDERS = ["app", "components", "db", "lib", "public", "fixtures", "tests", ".ci"];
const TEST_FOLDERS = [
  "unit",
  "integration",
  "e2e",
  "reference",
  "architecture",
  "types",
  "bench",
  "support",
];
const GRAB_BAGS = new Set([
  "util",
  "utils",
  "helper",
  "helpers",
  "misc",
  "common",
  "shared",
  "functions",
  "constants",
  "types",
  "interfaces",
  "stuff",
]);
const KEBAB = /^[a-z0-9]+(-[a-z0-9]+)*$/;
/** A route's parameter is a name in code: `[pointId]`. */
const PARAMETER = /^\[{1,2}(\.\.\.)?[a-z][a-zA-Z0-9]*\]{1,2}$/;

/** A folder's or file's bare word: `(shed)`, `[code]`, `[...auth]`, `@modal`, `_parts`, `~offline` → the word. */
function bareWord(part: string): string {
  return part
    .replace(/^[@_~.]/, "")
    .replace(/^\((.*)\)$/, "$1")
    .replace(/^\[{1,2}(?:\.\.\.)?(.*?)\]{1,2}$/, "$1");
}

function partsOf(name: string): { folders: string[]; stem: string } {
  const parts = name.split("/");
  const file = parts.pop() ?? "";
  return { folders: parts, stem: file.replace(/(\.d|\.test|\.spec|\.bench|\.config)?\.\w+$/, "") };
}

function areaViolation(name: string): string | null {
  const [, area, ...rest] = name.split("/");
  if (area === undefined || rest.length === 0) return "lib holds areas and edges, no loose files";
  if (EDGES.includes(area)) return null;
  if (!AREAS.includes(area)) return `${area} is not in the list of areas`;
  if (area === "core" || area === "platform") {
    return rest.length === 1 ? null : `${area} is one file for each topic`;
  }
  const first = (rest[0] ?? "").replace(/\.ts$/, "");
  if (AREA_EXTRAS[area]?.includes(rest.join("/"))) return null;
  if (!AREA_FILES.includes(first)) return `an area holds only ${AREA_FILES.join(", ")}`;
  return rest.length > 2 ? "a folder of an area is flat" : null;
}

/** Folders, the five files of an area, words that say nothing, kebab-case. */
export function nameViolations(files: readonly SourceFile[]): Violation[] {
  const found: Violation[] = [];
  const add = (rule: string, file: string, detail: string) => found.push({ rule, file, detail });
  for (const { name } of files) {
    const top = name.split("/")[0] ?? "";
    if (name.includes("/") && !TOP_FOLDERS.includes(top)) {
      add("top-level", name, `${top} is not a folder of the tree`);
    }
    if (name.startsWith("tests/") && !TEST_FOLDERS.includes(name.split("/")[1] ?? "")) {
      add("top-level", name, "not a folder of tests");
    }
    if (!isCode(name)) continue;
    const { folders, stem } = partsOf(name);
    if (name.startsWith("lib/")) {
      const problem = areaViolation(name);
      if (problem) add("five-files", name, problem);
    }
    if (stem === "index") add("no-index", name, "import the file itself");
    for (const part of [...folders, stem]) {
      if (PARAMETER.test(part)) continue;
      const word = bareWord(part);
      const isTypeTests = name.startsWith("tests/types/") && word === "types";
      if (GRAB_BAGS.has(word) && !isTypeTests) add("no-grab-bag", name, `"${word}" says nothing`);
      if (!KEBAB.test(word.replaceAll(".", "-"))) add("kebab-case", name, `"${word}"`);
    }
  }
  return found;
}
