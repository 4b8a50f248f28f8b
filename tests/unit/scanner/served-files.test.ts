import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { ZXING_WASM_SHA256, ZXING_WASM_VERSION } from "zxing-wasm/reader";
import { WASM, buildScanner } from "@/lib/cli/build-scanner.mjs";
import { contentSecurityPolicy } from "@/lib/http/security-headers";
import { SCANNER_HEADERS } from "@/next.config.mjs";

const ROOT = path.resolve(import.meta.dirname, "../../..");

describe("what the scanner is served as", () => {
  it("is the very WebAssembly that its glue is of, of the version in package.json", async () => {
    await buildScanner(ROOT);
    const served = fs.readFileSync(path.join(ROOT, "public/scanner/zxing_reader.wasm"));
    const { dependencies } = JSON.parse(
      fs.readFileSync(path.join(ROOT, "package.json"), "utf8"),
    ) as { dependencies: Record<string, string> };
    expect(createHash("sha256").update(served).digest("hex")).toBe(WASM.sha256);
    expect(ZXING_WASM_SHA256).toBe(WASM.sha256);
    expect([ZXING_WASM_VERSION, dependencies["zxing-wasm"]]).toEqual([WASM.version, WASM.version]);
  });

  it("asks nobody else for anything", () => {
    const worker = fs.readFileSync(path.join(ROOT, "public/scanner/scan-worker.js"), "utf8");
    expect(worker).toContain("/scanner/zxing_reader.wasm");
    // The glue names a content network as its default; the bytes that it is given keep it from asking.
    const addresses = [...worker.matchAll(/https?:\/\/[^"'`$\s]*/g)].map(([address]) => address);
    for (const address of addresses) expect(address).toMatch(/^https:\/\/fastly\.jsdelivr\.net\//);
    const policy = SCANNER_HEADERS.find(({ key }) => key === "content-security-policy")?.value;
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("connect-src 'self'");
  });

  it("may run WebAssembly in its worker, and nowhere else", () => {
    const policy = SCANNER_HEADERS.find(({ key }) => key === "content-security-policy")?.value;
    expect(policy).toContain("script-src 'self' 'wasm-unsafe-eval'");
    expect(contentSecurityPolicy("n", false, "https://storage.example")).not.toContain("wasm");
  });
});
