/**
 * The built program for one browser test file: on a free port, with a copy of a database of its own. Nothing
 * is shared with another file.
 */
import { execFileSync, spawn, type ChildProcess } from "node:child_process";
import { randomBytes } from "node:crypto";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import type { BrowserContext } from "@playwright/test";
import Database from "better-sqlite3";
import { encode } from "next-auth/jwt";
import { NEXT_BIN, fingerprint } from "@/lib/cli/build.mjs";
import { tryPort, waitUntilHealthy } from "@/lib/cli/ports.mjs";
import { storageEnvironment } from "@/lib/cli/storage-process.mjs";
import { newId, type PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { SESSION_MS, sessionCookieName } from "@/lib/identity/terms";
import { endProcess, storageProcess, type StorageProcess } from "./storage-process";

const ROOT = path.resolve(import.meta.dirname, "../..");
const KEPT = path.join(ROOT, ".cache/e2e");

export type StartingPoint = "empty" | "shed" | "demo";

export type E2eServer = {
  /** http://localhost:PORT, without a slash at the end. */
  url: string;
  /** Of the server's process, until stop(). */
  pid: () => number;
  databaseFile: string;
  /** The folder of database and mail; gone after close(). */
  folder: string;
  /** Read or prepare rows directly; the ledger's tables refuse what the program would not do. */
  query: <Row>(sql: string, ...values: (string | number | null)[]) => Row[];
  /** A new session of the first person of a role. */
  session: (role: Role) => Promise<{ id: string; cookie: { name: string; value: string } }>;
  /** Signs a browser in as a role. */
  signIn: (context: BrowserContext, role: Role) => Promise<void>;
  /** The stand-in for the picture storage; not started until a test asks for it, ended with the server. */
  storage: StorageProcess;
  /** Everything that the server has logged. */
  log: () => string;
  /** Ends the server and leaves it ended until start(): "the server is gone". */
  stop: () => Promise<void>;
  start: () => Promise<void>;
  close: () => Promise<void>;
};

/** A finished database of this kind; made once for these sources and this day, then copied. */
function template(what: StartingPoint): string {
  const stamp = `${fingerprint(ROOT).slice(0, 16)}-${new Date().toISOString().slice(0, 10)}`;
  const file = path.join(KEPT, `${what}-${stamp}.db`);
  if (fs.existsSync(file)) return file;
  fs.mkdirSync(KEPT, { recursive: true });
  for (const old of fs.readdirSync(KEPT)) {
    if (old.startsWith(`${what}-`)) fs.rmSync(path.join(KEPT, old), { force: true });
  }
  const making = path.join(KEPT, `${what}-${process.pid}.making`);
  const flags = ["--conditions=react-server", "--import", "tsx"];
  execFileSync(process.execPath, [...flags, "tests/support/make-e2e-database.ts", making, what], {
    cwd: ROOT,
    stdio: ["ignore", "ignore", "inherit"],
    env: { ...process.env, BISMAR_MODE: "test" },
  });
  fs.renameSync(making, file);
  return file;
}

/**
 * Starts the program. Call it in `beforeAll` and `close()` in `afterAll`.
 *
 * @param from what its database holds at first; a file is copied
 * @param environment further settings, such as TRUSTED_PROXY
 * @throws Error with the end of the log when the program does not answer
 */
export async function startE2eServer(
  from: StartingPoint | { file: string } = "shed",
  environment: Readonly<Record<string, string>> = {},
): Promise<E2eServer> {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-e2e-"));
  const databaseFile = path.join(folder, "bismar.db");
  const logFile = path.join(folder, "server.log");
  fs.copyFileSync(typeof from === "string" ? template(from) : from.file, databaseFile);
  const [port, storagePort] = await Promise.all([tryPort(0), tryPort(0)]);
  if (port === null || storagePort === null) throw new Error("No port is free.");
  const url = `http://localhost:${port}`;
  const storageSettings = storageEnvironment({
    port: storagePort,
    folder: path.join(folder, "photos"),
  });
  const storage = storageProcess(storageSettings, url);
  const secret = randomBytes(32).toString("hex");
  const cookieName = sessionCookieName(false);
  let child: ChildProcess | undefined;
  const endWithThis = () => child?.kill("SIGKILL");
  process.once("exit", endWithThis);

  const start = async (): Promise<void> => {
    const out = fs.openSync(logFile, "a");
    const server = spawn(
      process.execPath,
      [NEXT_BIN, "start", "-p", String(port), "-H", "127.0.0.1"],
      {
        cwd: ROOT,
        stdio: ["ignore", out, out],
        env: {
          PATH: process.env.PATH,
          HOME: process.env.HOME,
          TZ: "UTC",
          NODE_ENV: "production",
          NEXT_TELEMETRY_DISABLED: "1",
          BISMAR_MODE: "test",
          DATABASE_FILE: databaseFile,
          PUBLIC_URL: url,
          NEXTAUTH_URL: url,
          NEXTAUTH_SECRET: secret,
          MAIL_MODE: "folder",
          SMTP_URL: "",
          ...storageSettings,
          ...environment,
        },
      },
    );
    fs.closeSync(out);
    child = server;
    const isGone = () => server.exitCode !== null || server.signalCode !== null;
    if (!(await waitUntilHealthy(`http://127.0.0.1:${port}`, isGone))) {
      server.kill("SIGKILL");
      const tail = fs.readFileSync(logFile, "utf8").split("\n").slice(-30).join("\n");
      throw new Error(`The program did not answer at ${url}:\n${tail}`);
    }
  };

  const stop = async (): Promise<void> => {
    if (!child) return;
    await endProcess(child);
    child = undefined;
  };

  const query = <Row>(sql: string, ...values: (string | number | null)[]): Row[] => {
    const client = new Database(databaseFile, { timeout: 5000 });
    try {
      client.pragma("foreign_keys = ON");
      client.pragma("recursive_triggers = ON");
      const statement = client.prepare(sql);
      if (statement.reader) return statement.all(...values) as Row[];
      statement.run(...values);
      return [];
    } finally {
      client.close();
    }
  };

  const session: E2eServer["session"] = async (role) => {
    const [person] = query<{ id: PersonId }>(
      "select id from people where role = ? and removed_at is null order by id limit 1",
      role,
    );
    if (!person) throw new Error(`Nobody is ${role} in this database.`);
    const at = Date.now();
    const id = newId<"session">(at);
    query(
      "insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)",
      id,
      person.id,
      at,
      at + SESSION_MS,
    );
    const value = await encode({
      token: { personId: person.id, sessionId: id },
      secret,
      maxAge: SESSION_MS / 1000,
    });
    return { id, cookie: { name: cookieName, value } };
  };

  await start().catch((error: unknown) => {
    process.off("exit", endWithThis);
    fs.rmSync(folder, { recursive: true, force: true });
    throw error;
  });
  return {
    url,
    pid: () => child?.pid ?? 0,
    databaseFile,
    folder,
    query,
    session,
    storage,
    signIn: async (context, role) => {
      const { cookie } = await session(role);
      await context.addCookies([{ ...cookie, url, httpOnly: true, sameSite: "Lax" }]);
    },
    log: () => fs.readFileSync(logFile, "utf8"),
    stop,
    start,
    close: async () => {
      await storage.stop();
      await stop();
      process.off("exit", endWithThis);
      fs.rmSync(folder, { recursive: true, force: true });
    },
  };
}
