import path from "node:path";
import { defineConfig } from "vitest/config";

export default defineConfig({
  resolve: {
    alias: {
      "@": import.meta.dirname,
      // Server modules import it as a guard for the bundler; here nothing is bundled.
      "server-only": path.resolve(import.meta.dirname, "tests/support/server-only.ts"),
    },
  },
  test: {
    projects: ["unit", "integration", "reference", "architecture"].map((name) => ({
      extends: true as const,
      test: {
        name,
        include: [`tests/${name}/**/*.test.ts`, `tests/${name}/**/*.test.tsx`],
        globalSetup: name === "integration" ? ["tests/support/template-database.ts"] : [],
        testTimeout: 60_000,
        hookTimeout: 60_000,
        env: { TZ: "UTC" },
        // A process for each of seventy files costs more than all their tests; rules have no state to keep apart.
        isolate: name !== "unit",
      },
    })),
  },
});
