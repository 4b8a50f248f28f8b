/**
 * The Chromium that tests drive: the one named by CHROMIUM_PATH, else the system's, else Playwright's own;
 * made available, where none is there, by Playwright's download or by the distribution's package.
 */
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { chromium } from "@playwright/test";

const NAMES = ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome"];
const FOLDERS = ["/usr/bin", "/usr/local/bin", "/snap/bin"];
const ROOT = path.resolve(import.meta.dirname, "../..");
const INSTALL_MS = 10 * 60_000;

function isExecutable(file) {
  try {
    fs.accessSync(file, fs.constants.X_OK);
    return fs.statSync(file).isFile();
  } catch {
    return false;
  }
}

/** @returns {string | null} the browser that is here now */
export function installedBrowser() {
  const named = process.env.CHROMIUM_PATH;
  if (named) {
    if (!isExecutable(named))
      throw new Error(`CHROMIUM_PATH=${named} is no program that can be run.`);
    return named;
  }
  const folders = [...(process.env.PATH ?? "").split(path.delimiter).filter(Boolean), ...FOLDERS];
  for (const name of NAMES) {
    const found = folders.map((folder) => path.join(folder, name)).find(isExecutable);
    if (found) return found;
  }
  const own = chromium.executablePath();
  return own && isExecutable(own) ? own : null;
}

function attempt(command, args) {
  try {
    execFileSync(command, args, {
      cwd: ROOT,
      stdio: ["ignore", "ignore", "pipe"],
      timeout: INSTALL_MS,
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    });
    return null;
  } catch (error) {
    const said = String(error.stderr ?? "")
      .trim()
      .split("\n")
      .at(-1);
    return `${[command, ...args].join(" ")}: ${said || error.message}`;
  }
}

/**
 * Finds a browser, or makes one available.
 *
 * @param {(line: string) => void} say
 * @returns {string | null} null, and why in plain words through say, when none can be had
 */
export function requireBrowser(say) {
  const found = installedBrowser();
  if (found) return found;
  say("No Chromium here: Playwright's own is fetched.");
  const tried = [
    attempt(process.execPath, ["node_modules/@playwright/test/cli.js", "install", "chromium"]),
  ];
  if (!installedBrowser() && process.getuid?.() === 0 && fs.existsSync("/usr/bin/apt-get")) {
    say("That did not work: the distribution's package is installed.");
    tried.push(attempt("apt-get", ["update"]));
    tried.push(attempt("apt-get", ["install", "-y", "--no-install-recommends", "chromium"]));
  }
  const now = installedBrowser();
  if (!now) {
    for (const failure of tried) if (failure) say(`  ${failure}`);
    say(
      "No Chromium can be had, so browser tests are skipped. Install one, or name it in CHROMIUM_PATH.",
    );
  }
  return now;
}
