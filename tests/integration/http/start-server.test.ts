import { spawnSync } from "node:child_process";
import path from "node:path";
import { describe, expect, it } from "vitest";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const GOOD = {
  NODE_ENV: "production" as const,
  PUBLIC_URL: "https://shed.saltmarsh.example",
  NEXTAUTH_SECRET: "0123456789abcdef0123456789abcdef",
  SMTP_URL: "smtp://127.0.0.1:2525",
  UPLOADTHING_TOKEN: Buffer.from(
    JSON.stringify({ apiKey: "sk_live_of_this_test", appId: "test", regions: ["sea1"] }),
  ).toString("base64"),
};

/** Starts what instrumentation.ts starts, in a process of its own with these settings alone. */
function start(
  environment: typeof GOOD & {
    MAIL_MODE?: string;
    STORAGE_MODE?: string;
    UPLOADTHING_INGEST_URL?: string;
  },
) {
  const call = 'import("./lib/http/start-server.ts").then((m) => m.startServer())';
  return spawnSync(
    process.execPath,
    ["--conditions=react-server", "--import", "tsx", "--input-type=module", "-e", call],
    {
      cwd: ROOT,
      encoding: "utf8",
      env: { PATH: process.env.PATH, ...environment },
    },
  );
}

describe("a server", () => {
  it("starts with settings that are whole", () => {
    const { status, stdout, stderr } = start(GOOD);
    expect(stderr).toBe("");
    expect(status).toBe(0);
    expect(stdout).toContain('"event":"started"');
  });

  it.each([
    ["no secret", { NEXTAUTH_SECRET: "" }, "NEXTAUTH_SECRET"],
    [
      "the demo's secret",
      { NEXTAUTH_SECRET: "demo-secret-not-for-production-0000" },
      "NEXTAUTH_SECRET",
    ],
    ["no address", { PUBLIC_URL: "" }, "PUBLIC_URL"],
    ["no mail server", { SMTP_URL: "" }, "SMTP_URL"],
    ["no picture storage", { UPLOADTHING_TOKEN: "" }, "UPLOADTHING_TOKEN"],
    ["the picture storage's stand-in", { STORAGE_MODE: "fake" }, "STORAGE_MODE"],
    [
      "a picture storage of both kinds",
      { UPLOADTHING_INGEST_URL: "http://localhost:4151" },
      "UPLOADTHING_INGEST_URL",
    ],
    ["a mail folder that nobody reads", { MAIL_MODE: "folder", SMTP_URL: "" }, "MAIL_MODE"],
  ])("ends with %s, and names the variable", (_, change, named) => {
    const { status, stderr } = start({ ...GOOD, ...change });
    expect(status).toBe(1);
    expect(stderr).toContain(named);
    expect(stderr).not.toContain("    at ");
  });
});
