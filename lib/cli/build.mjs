/** Builds the program when what was built is not what stands in the folder now. */
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { buildScanner } from "./build-scanner.mjs";
import { buildWorkers } from "./build-workers.mjs";
import { runToEnd } from "./own-processes.mjs";

const FOLDERS = ["app", "components", "db", "lib", "public"];
const STAMP = ".next/bismar-build.json";
export const NEXT_BIN = "node_modules/next/dist/bin/next";

/** Root files that go into a build. Next rewrites tsconfig.json by itself, so it does not count. */
function rootFiles(root) {
  return fs
    .readdirSync(root)
    .filter(
      (name) => /\.(ts|mjs|json)$/.test(name) && !/^(next-env\.d\.ts|tsconfig\.json)$/.test(name),
    );
}

function filesUnder(root, folder) {
  if (!fs.existsSync(path.join(root, folder))) return [];
  return fs.readdirSync(path.join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const name = `${folder}/${entry.name}`;
    return entry.isDirectory() ? filesUnder(root, name) : [name];
  });
}

/**
 * SHA-256 over every source file's name and content and the kind of Node.
 *
 * @param {string} root the project's folder
 */
export function fingerprint(root) {
  const hash = createHash("sha256").update(`node ${process.versions.modules}\0`);
  const names = [
    ...rootFiles(root),
    ...FOLDERS.flatMap((folder) => filesUnder(root, folder)),
  ].sort();
  for (const name of names) {
    const content = fs.readFileSync(path.join(root, name));
    hash.update(`${name}\0${content.length}\0`).update(content);
  }
  return hash.digest("hex");
}

/** Is there a finished build of exactly these sources? */
export function isBuilt(root) {
  try {
    const stamp = JSON.parse(fs.readFileSync(path.join(root, STAMP), "utf8"));
    return (
      fs.existsSync(path.join(root, ".next/BUILD_ID")) && stamp.fingerprint === fingerprint(root)
    );
  } catch {
    return false;
  }
}

/**
 * Builds in any case.
 *
 * @param {string} root the project's folder
 * @param {import("node:child_process").StdioOptions} stdio
 * @returns {Promise<number>} the exit code of `next build`
 */
export async function build(root, stdio = "inherit") {
  // First, because Next serves it and the fingerprint counts it.
  await buildScanner(root);
  const print = fingerprint(root);
  fs.rmSync(path.join(root, STAMP), { force: true });
  const env = { ...process.env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" };
  const code = await runToEnd(process.execPath, [NEXT_BIN, "build"], { cwd: root, env, stdio });
  // Next empties its folder first.
  if (code !== 0) return code;
  await buildWorkers(root);
  fs.writeFileSync(path.join(root, STAMP), `${JSON.stringify({ fingerprint: print })}\n`);
  return 0;
}
