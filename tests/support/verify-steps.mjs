/** What `npm run verify` does, also as the first part of `npm test`. */
import fs from "node:fs";
import path from "node:path";
import { NEXT_BIN } from "../../lib/cli/build.mjs";
import { runToEnd } from "../../lib/cli/own-processes.mjs";
import { LOGS, ROOT, cleanEnvironment, countVitest } from "./steps.mjs";

/** A vitest project as a step. */
export function vitestStep(name, projects = [name]) {
  const report = path.join(LOGS, `${name}.json`);
  return {
    name,
    report,
    count: countVitest,
    args: [
      "node_modules/vitest/vitest.mjs",
      "run",
      ...projects.flatMap((project) => ["--project", project]),
      "--reporter=default",
      "--reporter=json",
      `--outputFile.json=${report}`,
    ],
  };
}

async function types(stdio) {
  const options = { cwd: ROOT, env: cleanEnvironment(), stdio };
  const typegen = await runToEnd(process.execPath, [NEXT_BIN, "typegen"], options);
  if (typegen !== 0) return typegen;
  return runToEnd(process.execPath, ["node_modules/typescript/bin/tsc", "--noEmit"], options);
}

/** Longest first; two at a time, on two cores. */
export function verifySteps() {
  fs.mkdirSync(path.join(ROOT, ".cache"), { recursive: true });
  return [
    {
      name: "lint",
      args: [
        "node_modules/eslint/bin/eslint.js",
        "--cache",
        "--cache-strategy",
        "content",
        "--cache-location",
        ".cache/eslint/",
        "--max-warnings",
        "0",
        ".",
      ],
    },
    { name: "types", run: types },
    vitestStep("architecture"),
    vitestStep("unit"),
    {
      name: "format",
      args: [
        "node_modules/prettier/bin/prettier.cjs",
        "--check",
        "--cache",
        "--cache-strategy",
        "content",
        "--cache-location",
        ".cache/prettier",
        ".",
      ],
    },
  ];
}
