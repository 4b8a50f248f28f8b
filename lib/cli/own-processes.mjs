/**
 * Processes that a launcher starts, and how they end: with the launcher, all of them, and nothing else.
 * Each child leads a process group of its own, so that what it started ends with it.
 */
import { spawn } from "node:child_process";
import { setTimeout as wait } from "node:timers/promises";

const GRACE_MS = 10_000;
const groups = process.platform !== "win32";
const running = new Set();
/** Ended themselves, but something that they started in their group has not. */
const leftBehind = new Set();
let stopping = false;

/** @returns {boolean} was anything there to be signalled? 0 only asks. */
function signal(child, name) {
  if (child.pid === undefined) return false;
  try {
    return groups ? process.kill(-child.pid, name) : child.kill(name);
  } catch {
    // Gone already, which is what was wanted.
    return false;
  }
}

function clearGroup(child) {
  running.delete(child);
  // While any of it lives, its number cannot have become another's.
  if (!groups || !signal(child, "SIGTERM")) return;
  leftBehind.add(child);
  setTimeout(() => {
    signal(child, "SIGKILL");
    leftBehind.delete(child);
  }, 2000).unref();
}

/**
 * Starts a program that ends with this one.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {import("node:child_process").SpawnOptions} options
 */
export function startProcess(command, args, options = {}) {
  if (stopping) throw new Error("Stopping: nothing is started any more.");
  const child = spawn(command, args, { stdio: "inherit", ...options, detached: groups });
  running.add(child);
  child.once("error", () => running.delete(child));
  child.once("exit", () => clearGroup(child));
  return child;
}

/**
 * Runs a program to its end.
 *
 * @returns {Promise<number>} its exit code; 1 when a signal ended it
 */
export function runToEnd(command, args, options) {
  return new Promise((resolve, reject) => {
    // Never settles: this process is about to exit, and what was to follow must not.
    if (stopping) return;
    const child = startProcess(command, args, options);
    child.once("error", reject);
    child.once("exit", (code) => resolve(code ?? 1));
  });
}

/** Ends everything that was started here: asked first, made to after ten seconds. */
export async function endAll() {
  stopping = true;
  for (const child of running) signal(child, "SIGTERM");
  const deadline = Date.now() + GRACE_MS;
  while (running.size > 0 && Date.now() < deadline) await wait(50);
  for (const child of running) signal(child, "SIGKILL");
}

/**
 * From now on Ctrl-C, SIGTERM and a closed terminal end everything that was started here, then this.
 *
 * @param {() => void} cleanUp runs last
 */
export function endWithSignals(cleanUp = () => undefined) {
  const codes = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129 };
  let asked = false;
  const end = (code) => {
    if (asked) return;
    asked = true;
    void endAll().then(() => {
      cleanUp();
      process.exit(code);
    });
  };
  for (const [name, code] of Object.entries(codes)) process.on(name, () => end(code));
  // npm hands a SIGTERM to the shell between us, which dies of it and tells nobody.
  if (process.env.npm_lifecycle_event) {
    const parent = process.ppid;
    setInterval(() => {
      if (process.ppid !== parent) end(codes.SIGTERM);
    }, 500).unref();
  }
  // An error of our own must not leave a server behind.
  process.on("exit", () => {
    for (const child of [...running, ...leftBehind]) signal(child, "SIGKILL");
  });
}

/** Is this launcher being ended? Then a child that ended is no failure. */
export function isStopping() {
  return stopping;
}
