/** One demo at a time on its database: a file that names the process, taken over when that process is gone. */
import fs from "node:fs";
import path from "node:path";

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    // Not ours to signal, but there.
    return error.code === "EPERM";
  }
}

function readLock(file) {
  try {
    return JSON.parse(fs.readFileSync(file, "utf8"));
  } catch {
    return null;
  }
}

/**
 * @param {string} file
 * @returns {{ note(values: object): void, release(): void }}
 * @throws Error when a demo is running; it names its address, process and this file
 */
export function takeLock(file) {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  for (let tries = 0; ; tries += 1) {
    try {
      fs.writeFileSync(file, JSON.stringify({ pid: process.pid }), { flag: "wx" });
      break;
    } catch (error) {
      if (error.code !== "EEXIST" || tries > 3) throw error;
      const held = readLock(file);
      if (held && isAlive(held.pid)) {
        throw new Error(
          `A demo is running already${held.url ? ` at ${held.url}` : ""} (process ${held.pid}). ` +
            `End it with Ctrl-C first. If there is none, remove ${path.relative(process.cwd(), file)}.`,
        );
      }
      fs.rmSync(file, { force: true });
    }
  }
  return {
    note: (values) => fs.writeFileSync(file, JSON.stringify({ pid: process.pid, ...values })),
    release: () => {
      if (readLock(file)?.pid === process.pid) fs.rmSync(file, { force: true });
    },
  };
}
