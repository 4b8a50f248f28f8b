/** A server of its own for the bench's page: the pictures, the scanner's files with their policy, the script. */
import fs from "node:fs";
import http from "node:http";
import path from "node:path";
import type { AddressInfo } from "node:net";
import { build } from "esbuild";
import { buildScanner } from "@/lib/cli/build-scanner.mjs";
import { SCANNER_HEADERS } from "@/next.config.mjs";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const TYPES: Record<string, string> = {
  ".js": "text/javascript",
  ".wasm": "application/wasm",
  ".png": "image/png",
  ".jpg": "image/jpeg",
};

async function script(): Promise<Buffer> {
  const { outputFiles } = await build({
    absWorkingDir: ROOT,
    entryPoints: ["tests/bench/scan-corpus/in-browser.ts"],
    bundle: true,
    write: false,
    format: "iife",
    platform: "browser",
    target: "es2022",
    external: ["node:*", "fs", "path", "url", "module"],
    logLevel: "error",
  });
  const [file] = outputFiles;
  if (!file) throw new Error("esbuild made nothing");
  return Buffer.from(file.contents);
}

/** @param pictures the folder of the corpus */
export async function serveBench(
  pictures: string,
): Promise<{ url: string; close: () => Promise<void> }> {
  await buildScanner(ROOT);
  const bench = await script();
  const server = http.createServer((request, response) => {
    const name = path.basename(request.url ?? "/");
    response.setHeader("content-type", TYPES[path.extname(name)] ?? "text/html");
    if (name === "") return response.end('<!doctype html><script src="/bench.js"></script>');
    if (name === "bench.js") return response.end(bench);
    const isScanner = request.url?.startsWith("/scanner/") === true;
    const file = path.join(isScanner ? path.join(ROOT, "public/scanner") : pictures, name);
    if (!fs.existsSync(file)) {
      response.statusCode = 404;
      return response.end();
    }
    if (isScanner) for (const { key, value } of SCANNER_HEADERS) response.setHeader(key, value);
    return response.end(fs.readFileSync(file));
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.address() as AddressInfo;
  return {
    url: `http://localhost:${port}/`,
    close: () =>
      new Promise((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  };
}
