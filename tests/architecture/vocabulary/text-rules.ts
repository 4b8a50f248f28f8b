/** What a file's text may not hold, whatever its language. */
import { LONG_FILES, MOST_LINES } from "./long-files";
import { isCode, type SourceFile, type Violation } from "./source-files";

/** A path of somebody's machine; a relative path or an address in the web is none. */
const MACHINE_PATH = /(?:^|[\s"'`(=:,[])(\/(?:work|root|home|Users|tmp)\/[\w.-]+)/m;
const EXACT = /^(\d+\.\d+\.\d+(-[\w.]+)?|\$[\w@/-]+)$/;

function lineCount(text: string): number {
  return text.split("\n").length - (text.endsWith("\n") ? 1 : 0);
}

function inexactVersions(text: string): string[] {
  const manifest = JSON.parse(text) as Record<string, unknown>;
  const found: string[] = [];
  const walk = (value: unknown, trail: string): void => {
    if (typeof value === "string") {
      if (!EXACT.test(value)) found.push(`${trail} ${value}`);
    } else if (typeof value === "object" && value !== null) {
      for (const [key, inner] of Object.entries(value)) walk(inner, `${trail} ${key}`.trim());
    }
  };
  for (const key of ["dependencies", "devDependencies", "optionalDependencies", "overrides"]) {
    walk(manifest[key], "");
  }
  return found;
}

/** Length, machine paths, exact versions, migrations. */
export function textViolations(
  files: readonly SourceFile[],
  longFiles: Readonly<Record<string, string>> = LONG_FILES,
): Violation[] {
  const found: Violation[] = [];
  const add = (rule: string, file: string, detail: string) => found.push({ rule, file, detail });
  const counted = new Map<string, number>();
  for (const { name, text } of files) {
    if (isCode(name) || /\.(css|sql)$/.test(name)) {
      const lines = lineCount(text);
      counted.set(name, lines);
      if (lines > MOST_LINES && !longFiles[name]) add("too-long", name, `${lines} lines`);
    }
    const machine = MACHINE_PATH.exec(text);
    if (machine && !name.startsWith("fixtures/")) add("machine-path", name, machine[1] ?? "");
    if (name === "package.json") {
      for (const version of inexactVersions(text)) add("exact-versions", name, version);
    }
    if (/^db\/(migrations\/.*\.sql|schema\/.*\.ts|triggers\.sql)$/.test(name)) {
      if (/on\s+delete\s+cascade|onDelete:\s*["']cascade/i.test(text)) {
        add("no-cascade", name, "a rebuilt table would empty its children");
      }
    }
  }
  for (const name of Object.keys(longFiles)) {
    const lines = counted.get(name);
    if (lines === undefined || lines <= MOST_LINES) {
      add("long-files-list", name, lines === undefined ? "does not exist" : `has ${lines} lines`);
    }
  }
  return found;
}
