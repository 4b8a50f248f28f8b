/** Installs the dependencies when they are missing or are not those of the lock file. Needs none itself. */
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { runToEnd } from "./own-processes.mjs";

function readJson(file) {
  try {
    return JSON.parse(fs.readFileSync(file, "utf8"));
  } catch {
    return null;
  }
}

/** Written after an installation from a lock file: its hash, so that the same one is not installed twice. */
const STAMP = "node_modules/.bismar-installed";

function lockHash(root) {
  const file = path.join(root, "package-lock.json");
  return fs.existsSync(file)
    ? createHash("sha256").update(fs.readFileSync(file)).digest("hex")
    : "";
}

function stampOf(root) {
  const file = path.join(root, STAMP);
  return fs.existsSync(file) ? fs.readFileSync(file, "utf8").trim() : null;
}

/**
 * What of the lock file is not installed: npm writes what it installed into node_modules/.package-lock.json
 * when it has finished, so an installation that broke off counts as none.
 *
 * @param {string} root the project's folder
 * @returns {string | null} the first package that is missing or has another version
 */
export function firstStale(root) {
  const locked = readJson(path.join(root, "package-lock.json"))?.packages ?? {};
  const installed = readJson(path.join(root, "node_modules/.package-lock.json"))?.packages;
  if (!installed) return "node_modules";
  if (stampOf(root) === lockHash(root)) return null;
  for (const [place, wanted] of Object.entries(locked)) {
    if (place === "") continue;
    const found = installed[place];
    // Packages for other kinds of machine, and leftovers that nothing asks for, are rightly not here.
    const dispensable = wanted.optional || wanted.devOptional || wanted.peer || wanted.extraneous;
    if (!found && dispensable) continue;
    if (found?.version !== wanted.version) return place;
  }
  return null;
}

/**
 * @param {string} root the project's folder
 * @throws Error when npm failed
 */
export async function installIfNeeded(root) {
  const stale = firstStale(root);
  if (stale === null) return;
  console.error(
    stale === "node_modules"
      ? "Installing the dependencies (once; a few minutes where the database module must be compiled)."
      : `Installing the dependencies again: ${stale} is not as in package-lock.json.`,
  );
  const env = { ...process.env };
  // With NODE_ENV=production npm would leave out what builds and tests need.
  delete env.NODE_ENV;
  const npm = process.env.npm_execpath;
  const args = ["ci", "--include=dev", "--no-audit", "--no-fund"];
  // What npm says goes to standard error: a command's own output may be read by another program.
  const stdio = ["ignore", process.stderr, process.stderr];
  const code = npm
    ? await runToEnd(process.execPath, [npm, ...args], { cwd: root, env, stdio })
    : await runToEnd("npm", args, { cwd: root, env, stdio, shell: process.platform === "win32" });
  if (code !== 0) throw new Error(`npm ci failed (exit code ${code}); its message is above.`);
  fs.writeFileSync(path.join(root, STAMP), `${lockHash(root)}\n`);
}
