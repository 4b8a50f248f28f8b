/**
 * Bundles the worker threads into plain JavaScript: a thread that had to load TypeScript by itself would hold
 * a compiler's memory for as long as an export takes.
 */
import path from "node:path";

const WORKERS = ["export-worker", "verify-worker"];

/**
 * Writes `.next/workers/NAME.mjs`, where `lib/platform/worker.ts` finds them.
 *
 * @param {string} root the project's folder
 */
export async function buildWorkers(root) {
  // Loaded here: whoever imports this file may be about to install it.
  const { build } = await import("esbuild");
  await build({
    absWorkingDir: root,
    entryPoints: WORKERS.map((name) => `lib/cli/${name}.ts`),
    outdir: path.join(root, ".next/workers"),
    outExtension: { ".js": ".mjs" },
    bundle: true,
    // Packages are loaded as they are installed; better-sqlite3 could not be bundled anyway.
    packages: "external",
    // The empty file that the package itself gives to servers: here is no bundler to guard against.
    alias: { "server-only": path.join(root, "node_modules/server-only/empty.js") },
    platform: "node",
    format: "esm",
    target: "node20",
    logLevel: "warning",
  });
}
