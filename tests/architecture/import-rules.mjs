/**
 * "Who may import whom" of DEVELOPERS.md as rules of dependency-cruiser, made from the list of areas.
 * The numbers in the names are those of that chapter.
 */
import { AREAS, EDGES } from "./areas.mjs";

const business = AREAS.filter((area) => area !== "core" && area !== "platform");
const any = (names) => `(${names.join("|")})`;

/** A module of an area by its file name, as file or as folder. */
const part = (areas, files) => `^lib/${any(areas)}/${any(files)}(/|\\.ts$)`;

/** What Next itself loads: routes and the root files that belong to them. */
const APP = "^(app/|proxy\\.ts$|instrumentation(-client)?\\.ts$)";
const TESTS = "^tests/";
const NEXT = "node_modules/(next|next-auth)/";
const IMPURE_PACKAGES =
  "node_modules/(next|next-auth|react|react-dom|react-hook-form|@tanstack/[^/]+|drizzle-orm|better-sqlite3|nodemailer|server-only|html5-qrcode|idb)/";

const forbid = (name, comment, from, to) => ({ name, comment, severity: "error", from, to });

const areaOrder = AREAS.slice(0, -1).map((area, index) =>
  forbid(
    `4-area-order-${area}`,
    `${area} comes before these in the list of areas.`,
    { path: `^lib/${area}/` },
    { path: `^lib/${any(AREAS.slice(index + 1))}/` },
  ),
);

export const IMPORT_RULES = [
  forbid(
    "1-app-is-the-top",
    "Nobody imports app, except tests.",
    { pathNot: [APP, TESTS] },
    { path: APP },
  ),

  forbid(
    "2-db-knows-terms-only",
    "db imports only lib/core and the areas' terms.",
    { path: "^db/", pathNot: "^db/seed/" },
    { path: "^(app|components|lib|tests)/", pathNot: ["^lib/core/", part(business, ["terms"])] },
  ),
  forbid(
    "2-seed-uses-commands",
    "The demo is made by the real commands; it needs nothing of the edges.",
    { path: "^db/seed/" },
    { path: `^(app|components|tests|lib/${any(EDGES)})/` },
  ),
  forbid(
    "2-who-reads-db",
    "Only queries, commands, platform, command-line entries and tests import db.",
    {
      pathNot: [
        "^db/",
        TESTS,
        "^lib/platform/",
        "^lib/cli/",
        part(business, ["queries", "commands"]),
      ],
    },
    { path: "^db/" },
  ),
  forbid(
    "2-who-reads-seed",
    "The demo is imported by its command-line entry and by tests.",
    { pathNot: ["^db/seed/", TESTS, "^lib/cli/"] },
    { path: "^db/seed/" },
  ),

  forbid(
    "3-pure-no-node",
    "core, rules, contract and terms are pure: no Node built-ins.",
    { path: ["^lib/core/", part(business, ["contract", "terms", "rules"])] },
    { dependencyTypes: ["core"] },
  ),
  forbid(
    "3-pure-no-framework",
    "core, rules, contract and terms are pure: no Next, React, Drizzle or other I/O.",
    { path: ["^lib/core/", part(business, ["contract", "terms", "rules"])] },
    { path: IMPURE_PACKAGES },
  ),
  forbid(
    "3-core-stands-alone",
    "core imports nothing of ours.",
    { path: "^lib/core/" },
    { path: "^(app|components|db|lib|tests)/", pathNot: "^lib/core/" },
  ),
  forbid(
    "3-terms-know-core",
    "terms import core.",
    { path: part(business, ["terms"]) },
    {
      path: "^(app|components|db|lib|tests)/",
      pathNot: ["^lib/core/", part(["[^/]+"], ["terms"])],
    },
  ),
  forbid(
    "3-contract-knows-core-and-terms",
    "A contract imports zod, core and terms.",
    { path: `^lib/([^/]+)/contract(/|\\.ts$)` },
    {
      path: "^(app|components|db|lib|tests)/",
      pathNot: ["^lib/core/", part(["[^/]+"], ["terms"]), "^lib/$1/contract(/|\\.ts$)"],
    },
  ),
  forbid(
    "3-rules-know-pure-files",
    "rules import core and the contract, terms and rules of their own or earlier areas.",
    { path: part(business, ["rules"]) },
    {
      path: "^(app|components|db|lib|tests)/",
      pathNot: ["^lib/core/", part(["[^/]+"], ["contract", "terms", "rules"])],
    },
  ),

  ...areaOrder,
  forbid(
    "4-edges-are-not-for-areas",
    "An area knows neither lib/http nor lib/offline nor lib/cli.",
    { path: `^lib/${any(AREAS)}/` },
    { path: `^lib/${any(EDGES)}/` },
  ),
  forbid("4-no-cycles", "No cycles.", {}, { circular: true }),
  forbid(
    "4-no-orphans",
    "A module that imports nothing and is imported by nothing is dead.",
    {
      orphan: true,
      pathNot: [APP, TESTS, "\\.d\\.ts$", "^lib/cli/", "^db/schema/"],
    },
    {},
  ),
  forbid("4-all-resolved", "Every import is found.", {}, { couldNotResolve: true }),
  forbid(
    "4-no-tests-in-the-program",
    "Nobody imports tests, except tests.",
    { pathNot: TESTS },
    { path: TESTS },
  ),

  forbid(
    "5-components-know-the-pure-files",
    "components import core, contracts, terms, rules and lib/offline; of the rest nothing but types of queries.",
    { path: "^components/" },
    {
      path: "^(app|db|lib|tests)/",
      pathNot: [
        "^lib/core/",
        "^lib/offline/",
        part(business, ["contract", "terms", "rules"]),
        part(business, ["queries"]),
      ],
    },
  ),
  forbid(
    "5-components-take-only-types-of-queries",
    "components import only types from queries.",
    { path: "^components/" },
    { path: part(business, ["queries"]), dependencyTypesNot: ["type-only"] },
  ),
  forbid(
    "5-ui-knows-no-area",
    "The kit is domain-free.",
    { path: "^components/ui/" },
    { path: "^(lib|components)/", pathNot: ["^components/ui/", "^lib/core/"] },
  ),

  forbid(
    "6-pages-never-write",
    "Pages and layouts never import commands; writes go through route handlers.",
    { path: "^app/", pathNot: "/route\\.ts$" },
    { path: part(business, ["commands"]) },
  ),
  forbid(
    "6-http-is-for-app",
    "lib/http is imported only by app.",
    { pathNot: [APP, TESTS, "^lib/http/"] },
    { path: "^lib/http/" },
  ),
  forbid(
    "6-offline-is-for-components",
    "lib/offline is imported only by components.",
    { pathNot: ["^components/", TESTS, "^lib/offline/"] },
    { path: "^lib/offline/" },
  ),
  forbid(
    "6-cli-is-a-way-in",
    "Command-line entries are imported by nobody.",
    { pathNot: [TESTS, "^lib/cli/"] },
    { path: "^lib/cli/" },
  ),

  forbid(
    "7-queries-never-write",
    "Queries run on the query_only connection; commands are not theirs to call.",
    { path: part(business, ["queries"]) },
    { path: part(business, ["commands"]) },
  ),
  forbid(
    "7-offline-is-for-browsers",
    "The offline queue runs in the browser: of ours it knows core and contracts.",
    { path: "^lib/offline/" },
    {
      path: "^(app|components|db|lib|tests)/",
      pathNot: ["^lib/offline/", "^lib/core/", part(business, ["contract", "terms"])],
    },
  ),

  forbid(
    "8-where-next-appears",
    "next and next-auth appear only in app, components, lib/http and lib/identity/auth.ts.",
    {
      pathNot: [
        APP,
        TESTS,
        "^components/",
        "^lib/http/",
        "^lib/identity/(auth\\.ts|next-auth\\.d\\.ts)$",
        "^next(-env\\.d\\.ts|\\.config\\.mjs)$",
        "node_modules/",
      ],
    },
    { path: NEXT },
  ),
];

/** What is read, and how. Paths are those of the folder that dependency-cruiser runs in. */
export const CRUISE_OPTIONS = {
  doNotFollow: { path: ["node_modules"] },
  exclude: { path: ["^\\.next/", "^next-env\\.d\\.ts$"] },
  tsPreCompilationDeps: true,
  enhancedResolveOptions: {
    exportsFields: ["exports"],
    conditionNames: ["import", "require", "node", "default", "types"],
    mainFields: ["module", "main", "types", "typings"],
    extensions: [".ts", ".tsx", ".mjs", ".js", ".d.ts", ".json"],
  },
};
