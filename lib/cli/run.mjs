/**
 * `node lib/cli/run.mjs <name> [...args]`: every way to run the program, from a clone that holds nothing
 * but the sources. Plain Node, because it installs what everything else needs.
 */
import fs from "node:fs";
import path from "node:path";
import { NEXT_BIN, build, isBuilt } from "./build.mjs";
import { buildScanner } from "./build-scanner.mjs";
import { buildWorkers } from "./build-workers.mjs";
import { installIfNeeded } from "./install.mjs";
import { endAll, endWithSignals, isStopping, runToEnd, startProcess } from "./own-processes.mjs";
import { tryPort } from "./ports.mjs";
import { STORAGE_ARGS, storageEnvironment } from "./storage-process.mjs";

const ROOT = path.resolve(import.meta.dirname, "../..");
const ENTRIES = {
  migrate: "lib/cli/migrate.ts",
  "ledger-verify": "lib/cli/ledger-verify.ts",
  "ledger-export": "lib/cli/ledger-export.ts",
  "set-up": "lib/cli/set-up.ts",
  backup: "lib/cli/backup.ts",
  "photos-tidy": "lib/cli/photos-tidy.ts",
};

/** The same files in the same order as Next reads them; what is set already stays. */
function loadEnvironment(mode) {
  for (const name of [`.env.${mode}.local`, ".env.local", `.env.${mode}`, ".env"]) {
    const file = path.join(ROOT, name);
    if (fs.existsSync(file)) process.loadEnvFile(file);
  }
}

/** Runs a TypeScript entry under the conditions of the server. */
function runEntry(entry, args, env = process.env) {
  const flags = ["--conditions=react-server", "--import", "tsx"];
  return runToEnd(process.execPath, [...flags, entry, ...args], { cwd: ROOT, env });
}

/**
 * Development gets the stand-in for the picture storage, unless the settings already name a storage.
 *
 * @returns {Promise<Record<string, string | undefined>>} the environment of the program
 */
async function withStorage(port) {
  const { STORAGE_MODE, UPLOADTHING_TOKEN, DATABASE_FILE, PUBLIC_URL } = process.env;
  if (STORAGE_MODE || UPLOADTHING_TOKEN) return process.env;
  const database = path.resolve(ROOT, DATABASE_FILE || "data/bismar.db");
  const folder = path.join(path.dirname(database), "photos");
  const own = storageEnvironment({ port: (await tryPort(0)) ?? 0, folder });
  const address = PUBLIC_URL || `http://localhost:${port}`;
  const env = { ...process.env, PUBLIC_URL: address, ...own };
  startProcess(process.execPath, STORAGE_ARGS, { cwd: ROOT, env });
  return env;
}

async function dev(args) {
  loadEnvironment("development");
  const migrated = await runEntry(ENTRIES.migrate, []);
  if (migrated !== 0) return migrated;
  await Promise.all([buildScanner(ROOT), buildWorkers(ROOT)]);
  const port = process.env.PORT ?? "3000";
  const env = await withStorage(port);
  const next = [NEXT_BIN, "dev", "-p", port, ...args];
  const code = await runToEnd(process.execPath, next, { cwd: ROOT, env });
  if (!isStopping()) await endAll();
  return code;
}

/** The production start: settings are checked and the database is migrated before anything listens. */
async function start(args) {
  loadEnvironment("production");
  const env = { ...process.env, NODE_ENV: "production", BISMAR_MODE: "production" };
  env.NEXTAUTH_URL ??= env.PUBLIC_URL;
  const migrated = await runEntry(ENTRIES.migrate, [], env);
  if (migrated !== 0) return migrated;
  if (!isBuilt(ROOT)) {
    console.error("The program was not built from these sources yet: building it first.");
    const built = await build(ROOT);
    if (built !== 0) return built;
  }
  const listen = ["-p", env.PORT || "3000", "-H", env.HOST || "0.0.0.0"];
  return runToEnd(process.execPath, [NEXT_BIN, "start", ...listen, ...args], { cwd: ROOT, env });
}

async function main([name, ...args]) {
  if (
    name === "dev" ||
    name === "start" ||
    name === "build" ||
    Object.hasOwn(ENTRIES, name ?? "")
  ) {
    await installIfNeeded(ROOT);
  }
  if (name === "dev") return dev(args);
  if (name === "start") return start(args);
  if (name === "build") return build(ROOT);
  if (Object.hasOwn(ENTRIES, name ?? "")) {
    loadEnvironment(process.env.NODE_ENV ?? "development");
    return runEntry(ENTRIES[name], args);
  }
  console.error(
    `Usage: node lib/cli/run.mjs ${["dev", "start", "build", ...Object.keys(ENTRIES)].join("|")}`,
  );
  return 2;
}

endWithSignals();
try {
  const code = await main(process.argv.slice(2));
  // While a signal is being answered, the exit code is that of the signal.
  if (!isStopping()) process.exitCode = code;
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  await endAll();
  process.exitCode = 1;
}
