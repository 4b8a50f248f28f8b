import { spawn } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { takeLock } from "@/lib/cli/demo-lock.mjs";

let folder = "";
let file = "";

beforeEach(() => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-lock-"));
  file = path.join(folder, "data/demo.lock");
});
afterEach(() => {
  fs.rmSync(folder, { recursive: true, force: true });
});

describe("the demo's lock", () => {
  it("refuses a second demo and says where the first one is", () => {
    const lock = takeLock(file);
    lock.note({ url: "http://localhost:3000" });
    expect(() => takeLock(file)).toThrow(
      new RegExp(`at http://localhost:3000 \\(process ${process.pid}\\)`),
    );
    lock.release();
    expect(fs.existsSync(file)).toBe(false);
    takeLock(file).release();
  });

  it("is taken over from a process that is gone", async () => {
    const child = spawn(process.execPath, ["-e", ""]);
    await new Promise((resolve) => child.once("exit", resolve));
    fs.mkdirSync(path.dirname(file));
    fs.writeFileSync(file, JSON.stringify({ pid: child.pid }));
    takeLock(file);
    expect(JSON.parse(fs.readFileSync(file, "utf8"))).toEqual({ pid: process.pid });
  });

  it("is taken over from a file that says nothing", () => {
    fs.mkdirSync(path.dirname(file));
    fs.writeFileSync(file, "");
    takeLock(file).release();
  });

  it("of another process is not released", () => {
    const lock = takeLock(file);
    fs.writeFileSync(file, JSON.stringify({ pid: process.pid + 1 }));
    lock.release();
    expect(fs.existsSync(file)).toBe(true);
  });
});
