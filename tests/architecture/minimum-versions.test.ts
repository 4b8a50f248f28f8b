/** Versions below which a known weakness stands, checked in the lock file: an advisory gate without a network. */
import fs from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { PROJECT } from "../support/planted-tree";

type Lock = { packages: Record<string, { version?: string }> };
type Least = Record<string, { least: string; why: string }>;

function readJson<T>(name: string): T {
  return JSON.parse(fs.readFileSync(path.join(PROJECT, name), "utf8")) as T;
}

function isBelow(version: string, least: string): boolean {
  const release = (text: string) => (text.split("-")[0] ?? "").split(".").map(Number);
  const [found, wanted] = [release(version), release(least)];
  for (let place = 0; place < 3; place += 1) {
    const difference = (found[place] ?? 0) - (wanted[place] ?? 0);
    if (difference !== 0) return difference < 0;
  }
  return version.includes("-");
}

/** Every copy in the lock file that is too old, and every name that is not there at all. */
function tooOld(lock: Lock, least: Least): string[] {
  return Object.entries(least).flatMap(([name, rule]) => {
    const copies = Object.entries(lock.packages).filter(
      ([place]) => place === `node_modules/${name}` || place.endsWith(`/node_modules/${name}`),
    );
    if (copies.length === 0) return [`${name} is not in the lock file`];
    return copies
      .filter(([, found]) => isBelow(found.version ?? "0.0.0", rule.least))
      .map(([place, found]) => `${place} ${found.version ?? "?"} is below ${rule.least}`);
  });
}

describe("minimum versions", () => {
  const least = readJson<Least>("tests/architecture/minimum-versions.json");

  it("are kept by every copy in the lock file", () => {
    expect(tooOld(readJson<Lock>("package-lock.json"), least)).toEqual([]);
  });

  it("report an old copy, an old nested copy, a pre-release and a missing package", () => {
    const packages = {
      "node_modules/next": { version: "16.4.5" },
      "node_modules/nodemailer": { version: "10.1.0" },
      "node_modules/mailer/node_modules/nodemailer": { version: "9.9.9" },
      "node_modules/react": { version: "19.3.1-rc.1" },
    };
    const rules = {
      next: { least: "16.4.6", why: "" },
      nodemailer: { least: "10.0.13", why: "" },
      react: { least: "19.3.1", why: "" },
      zod: { least: "4.6.7", why: "" },
    };
    expect(tooOld({ packages }, rules)).toEqual([
      "node_modules/next 16.4.5 is below 16.4.6",
      "node_modules/mailer/node_modules/nodemailer 9.9.9 is below 10.0.13",
      "node_modules/react 19.3.1-rc.1 is below 19.3.1",
      "zod is not in the lock file",
    ]);
  });

  it("give a reason each", () => {
    for (const [name, rule] of Object.entries(least)) {
      expect(rule.why.length, name).toBeGreaterThan(20);
    }
  });
});
