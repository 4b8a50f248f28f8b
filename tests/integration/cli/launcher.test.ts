/** The launchers as a person meets them: what a start refuses, and that ending one ends all of it. */
import { spawn } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { afterEach, describe, expect, it } from "vitest";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const OURS =
  /^(BISMAR_|NEXTAUTH_|MAIL_|SMTP_|STORAGE_|UPLOADTHING_|DATABASE_FILE$|PUBLIC_URL$|PORT$|NODE_ENV$)/;
const hostedToken = Buffer.from(
  JSON.stringify({ apiKey: "sk_live_of_this_test", appId: "test", regions: ["sea1"] }),
).toString("base64");
const folders: string[] = [];

function newFolder(): string {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-cli-"));
  folders.push(folder);
  return folder;
}

afterEach(() => {
  for (const folder of folders.splice(0)) fs.rmSync(folder, { recursive: true, force: true });
});

type Ended = { code: number | null; said: string };

function run(script: string, args: string[], settings: Record<string, string>): Promise<Ended> {
  const own = Object.entries(process.env).filter(([name]) => !OURS.test(name));
  const child = spawn(process.execPath, [script, ...args], {
    cwd: ROOT,
    env: { ...Object.fromEntries(own), ...settings } as NodeJS.ProcessEnv,
  });
  let said = "";
  child.stdout.on("data", (piece: Buffer) => (said += piece.toString()));
  child.stderr.on("data", (piece: Buffer) => (said += piece.toString()));
  return new Promise((resolve) => child.once("close", (code) => resolve({ code, said })));
}

describe("npm start", () => {
  const right = {
    PUBLIC_URL: "https://shed.example",
    NEXTAUTH_SECRET: "a-secret-of-this-test-alone-0123456789",
    SMTP_URL: "smtp://127.0.0.1:1",
    UPLOADTHING_TOKEN: hostedToken,
  };

  it.each([
    ["no address", { PUBLIC_URL: "" }, "PUBLIC_URL"],
    ["no secret", { NEXTAUTH_SECRET: "" }, "NEXTAUTH_SECRET"],
    ["a short secret", { NEXTAUTH_SECRET: "short" }, "NEXTAUTH_SECRET"],
    [
      "the demo's secret",
      { NEXTAUTH_SECRET: "demo-secret-not-for-production-0000" },
      "NEXTAUTH_SECRET",
    ],
    [
      "the demo's secret under the demo's mode",
      { NEXTAUTH_SECRET: "demo-secret-not-for-production-0000", BISMAR_MODE: "demo" },
      "NEXTAUTH_SECRET",
    ],
    ["no mail server", { SMTP_URL: "" }, "SMTP_URL"],
    ["mail to a folder", { MAIL_MODE: "folder", SMTP_URL: "" }, "MAIL_MODE"],
    ["no picture storage", { UPLOADTHING_TOKEN: "" }, "UPLOADTHING_TOKEN"],
    ["the picture storage's stand-in", { STORAGE_MODE: "fake" }, "STORAGE_MODE"],
    [
      "the stand-in's address",
      { UPLOADTHING_API_URL: "http://localhost:4151" },
      "UPLOADTHING_API_URL",
    ],
  ])(
    "with %s is refused by the variable's name, and touches no database",
    async (_what, wrong, variable) => {
      const file = path.join(newFolder(), "never.db");
      const settings = { ...right, DATABASE_FILE: file, ...wrong };
      const { code, said } = await run("lib/cli/run.mjs", ["start"], settings);
      expect(code).toBe(1);
      expect(said).toContain(`The program does not start. ${variable}`);
      expect(said).not.toMatch(/\bat .*:\d+:\d+/);
      expect(fs.existsSync(file)).toBe(false);
    },
  );

  it("is one of the ways that the launcher knows", async () => {
    const { code, said } = await run("lib/cli/run.mjs", ["fly"], {});
    expect(code).toBe(2);
    expect(said).toContain("dev|start|build|migrate");
  });
});

describe("npm run db:migrate", () => {
  it("makes the database that the settings name", async () => {
    const file = path.join(newFolder(), "deep/er/bismar.db");
    const { code } = await run("lib/cli/run.mjs", ["migrate"], { DATABASE_FILE: file });
    expect(code).toBe(0);
    expect(fs.existsSync(file)).toBe(true);
  });
});

describe("npm run demo", () => {
  it("does not know other options", async () => {
    const { code, said } = await run("lib/cli/demo.mjs", ["--frehs"], {});
    expect(code).toBe(1);
    expect(said).toContain("--frehs");
  });
});

describe("ending a launcher", () => {
  const isAlive = (pid: number) => {
    try {
      process.kill(pid, 0);
      return !/^State:\s+Z/m.test(fs.readFileSync(`/proc/${pid}/status`, "utf8"));
    } catch {
      return false;
    }
  };

  const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

  /** A launcher that starts a process, which starts another one that ignores being asked to end. */
  function plantLauncher(): { launcher: string; started: () => Promise<number[]> } {
    const folder = newFolder();
    const pids = path.join(folder, "pids");
    const library = pathToFileURL(path.join(ROOT, "lib/cli/own-processes.mjs")).href;
    const launcher = path.join(folder, "launcher.mjs");
    const inner = `process.on("SIGTERM", () => {}); setInterval(() => {}, 1000);`;
    const outer = `
      const { spawn } = require("node:child_process");
      const child = spawn(process.execPath, ["-e", ${JSON.stringify(inner)}]);
      require("node:fs").writeFileSync(${JSON.stringify(pids)}, process.pid + " " + child.pid);
      process.on("SIGTERM", () => setTimeout(() => process.exit(0), 200));
      setInterval(() => {}, 1000);`;
    fs.writeFileSync(
      launcher,
      `import { endWithSignals, runToEnd } from ${JSON.stringify(library)};
       endWithSignals();
       await runToEnd(process.execPath, ["-e", ${JSON.stringify(outer)}]);`,
    );
    const started = async () => {
      while (!fs.existsSync(pids) || fs.readFileSync(pids, "utf8") === "") await pause(50);
      await pause(300);
      return fs.readFileSync(pids, "utf8").split(" ").map(Number);
    };
    return { launcher, started };
  }

  it.skipIf(process.platform !== "linux").each(["SIGINT", "SIGTERM"] as const)(
    "with %s ends what it started, and what that started",
    async (signal) => {
      const { launcher, started } = plantLauncher();
      const child = spawn(process.execPath, [launcher], { stdio: "ignore" });
      const processes = await started();
      expect(processes.map(isAlive)).toEqual([true, true]);
      const code = new Promise((resolve) => child.once("exit", resolve));
      child.kill(signal);
      expect(await code).toBe(signal === "SIGINT" ? 130 : 143);
      await pause(300);
      expect(processes.map(isAlive)).toEqual([false, false]);
    },
  );

  it.skipIf(process.platform !== "linux")(
    "by ending npm ends it too, though npm's shell passes no signal on",
    async () => {
      const { launcher, started } = plantLauncher();
      const shell = spawn("sh", ["-c", `"${process.execPath}" "${launcher}"; true`], {
        stdio: "ignore",
        env: { ...process.env, npm_lifecycle_event: "demo" },
      });
      const processes = await started();
      expect(processes.map(isAlive)).toEqual([true, true]);
      shell.kill("SIGTERM");
      const deadline = Date.now() + 15_000;
      while (processes.some(isAlive) && Date.now() < deadline) await pause(100);
      expect(processes.map(isAlive)).toEqual([false, false]);
    },
  );
});
