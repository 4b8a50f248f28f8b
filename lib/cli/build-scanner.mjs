/**
 * The scanner's worker and its WebAssembly, as files that the program serves itself (public/scanner/, not
 * committed). A worker of its own, because only its answer may carry a policy that allows WebAssembly
 * (next.config.mjs), and pages' policies must not.
 */
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";

const OUT = "public/scanner";
const ENTRY = "components/scanner/worker/scan-worker.ts";
const PACKAGE = "node_modules/zxing-wasm";

/** The one file that was measured; another one of the same name is not shipped. */
export const WASM = {
  version: "3.1.3",
  sha256: "2ebda08a93eea3efcd8399cda6b276e6a0b1de4fec60b4d8988a047de4c6d1ba",
};

/** Writes only what is different, so that a running dev server and the build's stamp see no change. */
function put(file, content) {
  if (fs.existsSync(file) && fs.readFileSync(file).equals(content)) return;
  fs.writeFileSync(`${file}.part`, content);
  fs.renameSync(`${file}.part`, file);
}

/**
 * @param {string} root the project's folder
 * @throws Error when zxing-wasm is not the version, or its file not the bytes, that this program was made with
 */
export async function buildScanner(root) {
  const { version } = JSON.parse(fs.readFileSync(path.join(root, PACKAGE, "package.json"), "utf8"));
  if (version !== WASM.version) {
    throw new Error(`zxing-wasm is ${version}; the scanner is made for ${WASM.version}.`);
  }
  const wasm = fs.readFileSync(path.join(root, PACKAGE, "dist/reader/zxing_reader.wasm"));
  const sha256 = createHash("sha256").update(wasm).digest("hex");
  if (sha256 !== WASM.sha256) {
    throw new Error(`zxing_reader.wasm has SHA-256 ${sha256}, not ${WASM.sha256}. Install anew.`);
  }
  // Loaded only now: it needs what npm installs.
  const { build } = await import("esbuild");
  const { outputFiles } = await build({
    absWorkingDir: root,
    entryPoints: [ENTRY],
    bundle: true,
    write: false,
    format: "iife",
    platform: "browser",
    target: ["es2020"],
    minify: true,
    legalComments: "none",
    logLevel: "error",
    // The glue also knows how to run in Node; these branches are never taken in a browser.
    external: ["node:*", "fs", "path", "url", "module"],
    tsconfigRaw: { compilerOptions: { paths: { "@/*": ["./*"] } } },
  });
  const folder = path.join(root, OUT);
  fs.mkdirSync(folder, { recursive: true });
  put(path.join(folder, "scan-worker.js"), Buffer.from(outputFiles[0].contents));
  put(path.join(folder, "zxing_reader.wasm"), wasm);
}
