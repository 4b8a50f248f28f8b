/**
 * `npm run demo [-- --fresh]`: from a fresh clone to a running demo. Installs what is missing, makes and fills
 * the database once, builds when the sources changed, starts on a free port. Plain Node, because it
 * installs what everything else needs.
 */
import fs from "node:fs";
import path from "node:path";
import { NEXT_BIN, build, isBuilt } from "./build.mjs";
import { demoEnvironment } from "./demo-environment.mjs";
import { takeLock } from "./demo-lock.mjs";
import { installIfNeeded } from "./install.mjs";
import { endAll, endWithSignals, isStopping, runToEnd, startProcess } from "./own-processes.mjs";
import { choosePort, tryPort, waitUntilHealthy } from "./ports.mjs";
import { STORAGE_ARGS, storageEnvironment, waitUntilStoring } from "./storage-process.mjs";

const ROOT = path.resolve(import.meta.dirname, "../..");
/** Everything of the demo's: database, mail, pictures. */
const FOLDER = path.join(ROOT, "data/demo");
/** Filled here first, and moved when it is whole: a demo that broke off half filled is never kept. */
const PARTIAL = path.join(ROOT, "data/demo.partial");
const LOG = path.join(ROOT, "data/demo.log");
const DATABASE = "bismar.db";

const say = (line) => console.log(line);

async function runStep(entry, env, failure) {
  const flags = ["--conditions=react-server", "--import", "tsx"];
  const code = await runToEnd(process.execPath, [...flags, entry], { cwd: ROOT, env });
  if (code !== 0 && !isStopping()) throw new Error(failure);
}

/** Everything that the demo starts gets these settings; the folder is that of the database. */
function environmentIn(folder, port, storagePort) {
  return demoEnvironment({
    port,
    base: process.env,
    databaseFile: path.join(folder, DATABASE),
    storage: storageEnvironment({ port: storagePort, folder: path.join(folder, "photos") }),
  });
}

async function prepareDatabase(port) {
  // Nothing stores a picture here; the settings are checked all the same.
  if (fs.existsSync(path.join(FOLDER, DATABASE))) {
    const env = environmentIn(FOLDER, port, port);
    return runStep(
      "lib/cli/migrate.ts",
      env,
      "The demo's database could not be brought up to date.",
    );
  }
  say("Filling the demo's database: eight months of an invented scheme (about half a minute).");
  fs.rmSync(PARTIAL, { recursive: true, force: true });
  fs.mkdirSync(PARTIAL, { recursive: true });
  const env = environmentIn(PARTIAL, port, port);
  await runStep("lib/cli/migrate.ts", env, "The demo's database could not be made.");
  await runStep("lib/cli/seed-demo.ts", env, "The demo's database could not be filled.");
  if (isStopping()) return;
  fs.rmSync(FOLDER, { recursive: true, force: true });
  fs.renameSync(PARTIAL, FOLDER);
}

async function prepareBuild() {
  if (isBuilt(ROOT)) return;
  say("Building the program (about a minute).");
  const file = path.join(ROOT, "data/demo-build.log");
  const log = fs.openSync(file, "w");
  const code = await build(ROOT, ["ignore", log, log]);
  fs.closeSync(log);
  if (code !== 0 && !isStopping()) {
    console.error(fs.readFileSync(file, "utf8").split("\n").slice(-40).join("\n"));
    throw new Error("The program could not be built; what the build said is above.");
  }
}

function announce(url, kept) {
  const signIns = JSON.parse(fs.readFileSync(path.join(ROOT, "db/seed/sign-ins.json"), "utf8"));
  say("");
  say(`  Bismar's demo is ready:  ${url}`);
  say("");
  for (const { role, email, password } of signIns) {
    say(`  ${role.padEnd(12)} ${email.padEnd(32)} ${password}`);
  }
  say("");
  say(
    kept
      ? "  The data of last time was kept; npm run demo -- --fresh starts over."
      : "  Run it again and the data is kept; npm run demo -- --fresh starts over.",
  );
  say(`  The server's log is in ${path.relative(ROOT, LOG)}. Ctrl-C ends the demo.`);
}

/** The program, and the stand-in for its picture storage; when one of them ends, the demo does. */
async function startServers(port) {
  const storagePort = (await tryPort(0)) ?? 0;
  const env = environmentIn(FOLDER, port, storagePort);
  const log = fs.openSync(LOG, "w");
  const options = { cwd: ROOT, env, stdio: ["ignore", log, log] };
  const listen = ["start", "-p", String(port), "-H", "127.0.0.1"];
  const servers = [
    startProcess(process.execPath, [NEXT_BIN, ...listen], options),
    startProcess(process.execPath, STORAGE_ARGS, options),
  ];
  fs.closeSync(log);
  let gone = false;
  const ended = Promise.race(
    servers.map((server) => new Promise((resolve) => server.once("exit", resolve))),
  ).then(() => {
    gone = true;
  });
  const answers = await Promise.all([
    waitUntilHealthy(`http://127.0.0.1:${port}`, () => gone),
    waitUntilStoring(storagePort, () => gone),
  ]);
  return { ended, healthy: answers.every(Boolean) };
}

async function main(args) {
  const unknown = args.find((arg) => arg !== "--fresh");
  if (unknown) throw new Error(`npm run demo knows --fresh, not ${unknown}.`);
  const lock = takeLock(path.join(ROOT, "data/demo.lock"));
  endWithSignals(lock.release);
  try {
    await installIfNeeded(ROOT);
    // Asked at once, so that a port in use is told before the waiting, and again when it is over.
    const likelyPort = await choosePort(process.env.PORT);
    if (args.includes("--fresh")) fs.rmSync(FOLDER, { recursive: true, force: true });
    const kept = fs.existsSync(path.join(FOLDER, DATABASE));
    await Promise.all([prepareDatabase(likelyPort), prepareBuild()]);
    if (isStopping()) return;
    const port = await choosePort(process.env.PORT);
    const url = `http://localhost:${port}`;
    lock.note({ url });

    const { ended, healthy } = await startServers(port);
    if (healthy) announce(url, kept);
    else if (!isStopping()) {
      console.error(fs.readFileSync(LOG, "utf8").split("\n").slice(-30).join("\n"));
      throw new Error(`The server did not answer at ${url}; the end of its log is above.`);
    }
    await ended;
    if (!isStopping())
      throw new Error(`The server ended; its log is in ${path.relative(ROOT, LOG)}.`);
  } finally {
    if (!isStopping()) {
      await endAll();
      lock.release();
    }
  }
}

try {
  await main(process.argv.slice(2));
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
}
