/** The stand-in for the picture storage as a process of a test's own, which can be ended and started again. */
import { spawn, type ChildProcess } from "node:child_process";
import path from "node:path";
import { STORAGE_ARGS, waitUntilStoring } from "@/lib/cli/storage-process.mjs";

const ROOT = path.resolve(import.meta.dirname, "../..");

export type StorageProcess = {
  /** Where its files are: `files/` and `partial/`. */
  folder: string;
  /** http://localhost:PORT */
  url: string;
  start: () => Promise<void>;
  /** "The storage is down." Ends it at once when told to. */
  stop: (how?: "SIGTERM" | "SIGKILL") => Promise<void>;
};

/** Ends a process, made to after five seconds. */
export async function endProcess(
  child: ChildProcess,
  signal: "SIGTERM" | "SIGKILL" = "SIGTERM",
): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = new Promise((resolve) => child.once("exit", resolve));
  child.kill(signal);
  const tooLong = setTimeout(() => child.kill("SIGKILL"), 5000);
  await ended;
  clearTimeout(tooLong);
}

/**
 * @param settings what storageEnvironment() made
 * @param appUrl the program's address, whose pages may send and whose completion is called
 */
export function storageProcess(
  settings: Readonly<Record<string, string>>,
  appUrl: string,
): StorageProcess {
  const { STORAGE_FOLDER: folder = "", UPLOADTHING_INGEST_URL: url = "" } = settings;
  let child: ChildProcess | undefined;
  const endWithThis = () => child?.kill("SIGKILL");
  return {
    folder,
    url,
    async start() {
      if (child) return;
      const started = spawn(process.execPath, STORAGE_ARGS, {
        cwd: ROOT,
        stdio: ["ignore", "ignore", "inherit"],
        env: {
          PATH: process.env.PATH,
          HOME: process.env.HOME,
          NODE_ENV: "test",
          ...settings,
          PUBLIC_URL: appUrl,
        },
      });
      child = started;
      process.once("exit", endWithThis);
      const isGone = () => started.exitCode !== null || started.signalCode !== null;
      if (await waitUntilStoring(Number(new URL(url).port), isGone)) return;
      started.kill("SIGKILL");
      throw new Error(`The stand-in for the picture storage did not answer at ${url}.`);
    },
    async stop(how) {
      if (!child) return;
      await endProcess(child, how);
      process.off("exit", endWithThis);
      child = undefined;
    },
  };
}
