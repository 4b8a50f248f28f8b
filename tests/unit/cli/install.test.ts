import { createHash } from "node:crypto";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, describe, expect, it } from "vitest";
import { firstStale } from "@/lib/cli/install.mjs";

const folders: string[] = [];

/** A project whose lock file and installation say these versions. */
function project(locked: object, installed: object | null): string {
  const root = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-install-"));
  folders.push(root);
  fs.writeFileSync(
    path.join(root, "package-lock.json"),
    JSON.stringify({ packages: { "": {}, ...locked } }),
  );
  if (installed) {
    fs.mkdirSync(path.join(root, "node_modules"));
    fs.writeFileSync(
      path.join(root, "node_modules/.package-lock.json"),
      JSON.stringify({ packages: installed }),
    );
  }
  return root;
}

afterEach(() => {
  for (const folder of folders.splice(0)) fs.rmSync(folder, { recursive: true, force: true });
});

const zod = { "node_modules/zod": { version: "4.6.7" } };
const vitest = { "node_modules/vitest": { version: "4.1.12", dev: true } };

describe("what is not installed", () => {
  it("is everything where nothing is, or where an installation broke off", () => {
    expect(firstStale(project(zod, null))).toBe("node_modules");
    const broken = project(zod, zod);
    fs.rmSync(path.join(broken, "node_modules/.package-lock.json"));
    expect(firstStale(broken)).toBe("node_modules");
  });

  it("is nothing where all versions agree, more than needed or not", () => {
    expect(firstStale(project(zod, { ...zod, ...vitest }))).toBeNull();
  });

  it("is a package of another version, a missing one, a missing one for development", () => {
    expect(firstStale(project(zod, { "node_modules/zod": { version: "4.6.6" } }))).toBe(
      "node_modules/zod",
    );
    expect(firstStale(project(zod, {}))).toBe("node_modules/zod");
    expect(firstStale(project({ ...zod, ...vitest }, zod))).toBe("node_modules/vitest");
  });

  it("is not a package for another kind of machine", () => {
    const other = { "node_modules/@img/sharp-win32-x64": { version: "0.35.5", optional: true } };
    expect(firstStale(project({ ...zod, ...other }, zod))).toBeNull();
  });

  it("is not a leftover of the lock file that nothing asks for", () => {
    const leftover = { "node_modules/ajv": { version: "8.20.0", extraneous: true } };
    expect(firstStale(project({ ...zod, ...leftover }, zod))).toBeNull();
  });

  it("is nothing after an installation from this very lock file, whatever npm left out", () => {
    const root = project({ ...zod, ...vitest }, zod);
    const lock = fs.readFileSync(path.join(root, "package-lock.json"));
    const hash = createHash("sha256").update(lock).digest("hex");
    fs.writeFileSync(path.join(root, "node_modules/.bismar-installed"), `${hash}\n`);
    expect(firstStale(root)).toBeNull();
    fs.appendFileSync(path.join(root, "package-lock.json"), "\n");
    expect(firstStale(root)).toBe("node_modules/vitest");
  });

  it("is nothing in this project, whose tests are running", () => {
    expect(firstStale(path.resolve(import.meta.dirname, "../../.."))).toBeNull();
  });
});
