/** Servers that benches measure: the program itself, and the yardsticks. All listen on loopback. */
import { execFileSync, spawn, type ChildProcess } from "node:child_process";
import path from "node:path";
import { NEXT_BIN } from "@/lib/cli/build.mjs";
import { tryPort } from "@/lib/cli/ports.mjs";

const ROOT = path.resolve(import.meta.dirname, "../..");
const BARE = path.join(ROOT, "tests/bench/bare-next");
const NEXT = path.join(ROOT, NEXT_BIN);

export type Running = { url: string; pid: number; close: () => Promise<void> };

let isBareBuilt = false;

async function answers(url: string, child: ChildProcess): Promise<void> {
  for (let tries = 0; tries < 300; tries += 1) {
    if (child.exitCode !== null) break;
    const response = await fetch(url, { method: "HEAD" }).catch(() => null);
    if (response) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`${url} does not answer`);
}

async function running(
  args: string[],
  databaseFile: string,
  port: number,
  cwd: string,
): Promise<Running> {
  const child = spawn(process.execPath, args, {
    cwd,
    stdio: ["ignore", "ignore", "inherit"],
    env: {
      PATH: process.env.PATH,
      HOME: process.env.HOME,
      NODE_ENV: "production",
      NEXT_TELEMETRY_DISABLED: "1",
      DATABASE_FILE: databaseFile,
    },
  });
  const url = `http://127.0.0.1:${port}`;
  await answers(url, child);
  return {
    url,
    pid: child.pid ?? 0,
    close: () =>
      new Promise((resolve) => {
        child.once("exit", () => resolve());
        child.kill("SIGTERM");
      }),
  };
}

async function freePort(): Promise<number> {
  const port = await tryPort(0);
  if (port === null) throw new Error("No port is free.");
  return port;
}

/** The framework's own bare application, built once in a run. */
export async function startBareNext(databaseFile: string): Promise<Running> {
  if (!isBareBuilt) {
    execFileSync(process.execPath, [NEXT, "build", BARE], {
      cwd: BARE,
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
    });
    isBareBuilt = true;
  }
  const port = await freePort();
  return running(
    [NEXT, "start", BARE, "-p", String(port), "-H", "127.0.0.1"],
    databaseFile,
    port,
    BARE,
  );
}

/** node:http and nothing else. */
export async function startByHand(databaseFile: string): Promise<Running> {
  const port = await freePort();
  return running(
    [path.join(ROOT, "tests/bench/by-hand-server.mjs"), String(port)],
    databaseFile,
    port,
    ROOT,
  );
}
