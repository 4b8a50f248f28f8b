import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { fingerprint, isBuilt } from "@/lib/cli/build.mjs";

let root = "";
const write = (name: string, content: string) => {
  fs.mkdirSync(path.dirname(path.join(root, name)), { recursive: true });
  fs.writeFileSync(path.join(root, name), content);
};

beforeEach(() => {
  root = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-build-"));
  write("package.json", "{}");
  write("app/page.tsx", "export {};");
  write("lib/core/mass.ts", "export {};");
});
afterEach(() => {
  fs.rmSync(root, { recursive: true, force: true });
});

describe("a build's fingerprint", () => {
  it("changes with a source's content, name, presence, and with the lock file", () => {
    const seen = new Set([fingerprint(root)]);
    write("app/page.tsx", "export const changed = 1;");
    seen.add(fingerprint(root));
    fs.renameSync(path.join(root, "app/page.tsx"), path.join(root, "app/other.tsx"));
    seen.add(fingerprint(root));
    write("package-lock.json", "{}");
    seen.add(fingerprint(root));
    fs.rmSync(path.join(root, "lib/core/mass.ts"));
    seen.add(fingerprint(root));
    expect(seen.size).toBe(5);
  });

  it("does not change with what a build or a run leaves behind", () => {
    const before = fingerprint(root);
    for (const name of [
      "next-env.d.ts",
      "tsconfig.json",
      ".next/BUILD_ID",
      "data/demo/bismar.db",
    ]) {
      write(name, "made");
    }
    expect(fingerprint(root)).toBe(before);
  });

  it("tells a finished build of these sources from an older or broken one", () => {
    expect(isBuilt(root)).toBe(false);
    write(".next/bismar-build.json", JSON.stringify({ fingerprint: fingerprint(root) }));
    expect(isBuilt(root)).toBe(false);
    write(".next/BUILD_ID", "x");
    expect(isBuilt(root)).toBe(true);
    write("lib/core/mass.ts", "export const later = 1;");
    expect(isBuilt(root)).toBe(false);
  });
});
