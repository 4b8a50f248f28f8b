import js from "@eslint/js";
import next from "eslint-config-next/core-web-vitals";
import tseslint from "typescript-eslint";

export default tseslint.config(
  {
    ignores: [
      ".cache/**",
      "data/**",
      "node_modules/**",
      "next-env.d.ts",
      "test-results/**",
      "playwright-report/**",
      "db/migrations/**",
      "public/scanner/**",
      "**/.next/**",
    ],
  },
  js.configs.recommended,
  ...next,
  {
    files: ["**/*.ts", "**/*.tsx", "**/*.mts"],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      // After signing in or out the page is loaded anew on purpose: nothing of the session before stays.
      "@next/next/no-location-assign-relative-destination": "off",
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/no-floating-promises": "error",
      "@typescript-eslint/no-unused-vars": [
        "error",
        { argsIgnorePattern: "^_", varsIgnorePattern: "^_", ignoreRestSiblings: true },
      ],
      "@typescript-eslint/consistent-type-imports": [
        "error",
        { prefer: "type-imports", fixStyle: "inline-type-imports" },
      ],
      "@typescript-eslint/switch-exhaustiveness-check": [
        "error",
        { considerDefaultExhaustiveForUnions: true },
      ],
      // Event handlers may be async; what they throw is caught in them.
      "@typescript-eslint/no-misused-promises": [
        "error",
        { checksVoidReturn: { attributes: false } },
      ],
      // Numbers in sentences are meant; objects are not.
      "@typescript-eslint/restrict-template-expressions": ["error", { allowNumber: true }],
      "@typescript-eslint/no-confusing-void-expression": [
        "error",
        { ignoreArrowShorthand: true, ignoreVoidReturningFunctions: true },
      ],
      // A Next page or handler is async by its type, whether or not it waits for something.
      "@typescript-eslint/require-await": "off",
      // A schema's or a component's type parameter is often there for the caller's annotation.
      "@typescript-eslint/no-unnecessary-type-parameters": "off",
      "no-console": "error",
      eqeqeq: ["error", "always"],
      // react-hook-form hands out functions as methods that use no `this`.
      "@typescript-eslint/unbound-method": "off",
      // What is said in full reads without knowing the default.
      "@typescript-eslint/no-unnecessary-type-arguments": "off",
      // Photographs are served by our own route, and images.unoptimized is on.
      "@next/next/no-img-element": "off",
    },
  },
  {
    // What a person at a terminal or a test's reader sees.
    files: ["lib/cli/**", "tests/**"],
    rules: { "no-console": "off" },
  },
  {
    files: ["tests/**/*.ts", "tests/**/*.tsx"],
    rules: {
      // A test states what it expects; a missing value then fails on that line, which is the point.
      "@typescript-eslint/no-non-null-assertion": "off",
      "react-hooks/rules-of-hooks": "off",
    },
  },
  {
    files: ["**/*.mjs"],
    languageOptions: {
      globals: {
        console: "readonly",
        process: "readonly",
        URL: "readonly",
        fetch: "readonly",
        setTimeout: "readonly",
        clearTimeout: "readonly",
        AbortSignal: "readonly",
      },
    },
    rules: {
      "no-unused-vars": ["error", { argsIgnorePattern: "^_" }],
      "import/no-anonymous-default-export": "off",
    },
  },
);
