/**
 * A small tree in which every import rule is broken once, next to files that keep them all.
 * Each plant names the rules that must be reported for its file.
 */

type Plant = { rules: string[]; file: string; content: string };

const value = (name: string) => `export const ${name} = 1;\n`;
const using = (target: string, name: string) =>
  `import { ${name} } from "@/${target}";\nexport const made = ${name};\n`;

/** Right as they stand: a checker that reports one of these is too strict. */
export const ALLOWED_IMPORTS: Readonly<Record<string, string>> = {
  "lib/core/mass.ts": value("mass"),
  "lib/core/text.ts": using("lib/core/mass", "mass"),
  "lib/platform/database.ts": `import "server-only";\nimport { client } from "@/db/client";\nexport const database = client;\n`,
  "lib/audit/commands.ts": using("lib/platform/database", "database"),
  "lib/points/terms.ts": using("lib/core/mass", "mass"),
  "lib/points/contract.ts": `import * as z from "zod";\nimport { made } from "./terms";\nexport const contract = z.literal(made);\n`,
  "lib/points/rules.ts": using("lib/points/contract", "contract"),
  "lib/points/queries.ts": `import "server-only";\nimport { client } from "@/db/client";\nimport { made } from "./rules";\nexport type View = { made: number };\nexport const listed = [client, made];\n`,
  "lib/points/commands.ts": `import "server-only";\nimport { made } from "@/lib/audit/commands";\nimport { listed } from "./queries";\nexport const saved = [made, listed];\n`,
  "lib/sorting/rules.ts": using("lib/points/rules", "made"),
  "lib/sorting/commands/sort-bags.ts": using("lib/points/commands", "saved"),
  "lib/offline/queue.ts": using("lib/points/contract", "contract"),
  "lib/http/route.ts": `import { NextResponse } from "next/server";\nexport const route = NextResponse;\n`,
  "lib/cli/migrate.ts": using("db/migrate", "migrate"),
  "lib/cli/seed-demo.ts": using("db/seed/demo", "made"),
  "lib/identity/auth.ts": `import type { NextAuthOptions } from "next-auth";\nexport type Options = NextAuthOptions;\n`,
  "db/client.ts": using("lib/core/mass", "mass"),
  "db/migrate.ts": `import { made } from "./client";\nexport const migrate = made;\nexport const client = made;\n`,
  "db/schema/points.ts": using("lib/points/terms", "made"),
  "db/seed/demo.ts": using("lib/points/commands", "saved"),
  "components/ui/button.tsx": value("button"),
  "components/points/point-card.tsx": `import type { View } from "@/lib/points/queries";\nimport { button } from "@/components/ui/button";\nimport { listed } from "@/lib/offline/queue";\nexport const card = (view: View) => [view, button, listed];\n`,
  "app/page.tsx": `import { card } from "@/components/points/point-card";\nimport { listed } from "@/lib/points/queries";\nimport { route } from "@/lib/http/route";\nexport default [card, listed, route];\n`,
  "app/api/points/route.ts": `import { route } from "@/lib/http/route";\nimport { saved } from "@/lib/points/commands";\nexport const POST = [route, saved];\n`,
  "proxy.ts": `import { NextResponse } from "next/server";\nexport const proxy = NextResponse;\n`,
  "tests/unit/points/rules.test.ts": `import page from "@/app/page";\nimport { saved } from "@/lib/points/commands";\nexport const tested = [page, saved];\n`,
};

export const PLANTED_IMPORTS: readonly Plant[] = [
  {
    rules: ["1-app-is-the-top"],
    file: "components/points/reads-app.tsx",
    content: `import page from "@/app/page";\nexport const made = page;\n`,
  },
  {
    rules: ["2-db-knows-terms-only"],
    file: "db/schema/reads-rules.ts",
    content: using("lib/points/rules", "made"),
  },
  {
    rules: ["2-seed-uses-commands"],
    file: "db/seed/reads-http.ts",
    content: using("lib/http/route", "route"),
  },
  {
    rules: ["2-who-reads-db"],
    file: "app/reads-db.tsx",
    content: using("db/client", "made"),
  },
  {
    rules: ["2-who-reads-db", "3-rules-know-pure-files"],
    file: "lib/stock/rules.ts",
    content: using("db/client", "made"),
  },
  {
    rules: ["2-who-reads-seed"],
    file: "lib/platform/reads-seed.ts",
    content: using("db/seed/demo", "made"),
  },
  {
    rules: ["3-pure-no-node"],
    file: "lib/core/reads-files.ts",
    content: `import fs from "node:fs";\nexport const made = fs;\n`,
  },
  {
    rules: ["3-pure-no-framework"],
    file: "lib/weighing/rules/reads-drizzle.ts",
    content: `import { sql } from "drizzle-orm";\nexport const made = sql;\n`,
  },
  {
    rules: ["3-core-stands-alone", "4-area-order-core"],
    file: "lib/core/reads-terms.ts",
    content: using("lib/points/terms", "made"),
  },
  {
    rules: ["3-terms-know-core"],
    file: "lib/bags/terms.ts",
    content: using("lib/points/rules", "made"),
  },
  {
    rules: ["3-contract-knows-core-and-terms"],
    file: "lib/bags/contract.ts",
    content: using("lib/points/contract", "contract"),
  },
  {
    rules: ["3-rules-know-pure-files"],
    file: "lib/bags/rules.ts",
    content: using("lib/points/queries", "listed"),
  },
  {
    rules: ["4-area-order-points"],
    file: "lib/points/commands/reads-later.ts",
    content: using("lib/sorting/commands/sort-bags", "made"),
  },
  {
    rules: ["4-edges-are-not-for-areas", "6-http-is-for-app"],
    file: "lib/scales/commands.ts",
    content: using("lib/http/route", "route"),
  },
  {
    rules: ["4-no-cycles"],
    file: "lib/core/one-way.ts",
    content: `import type { Back } from "./other-way";\nexport type Forth = Back | 1;\n`,
  },
  {
    // A cycle is reported once, at the module where reading it began.
    rules: [],
    file: "lib/core/other-way.ts",
    content: `import type { Forth } from "./one-way";\nexport type Back = Forth | 2;\n`,
  },
  { rules: ["4-no-orphans"], file: "lib/core/lonely.ts", content: value("lonely") },
  {
    rules: ["4-all-resolved"],
    file: "lib/core/reads-nothing.ts",
    content: using("lib/core/not-there", "absent"),
  },
  {
    rules: ["4-no-tests-in-the-program"],
    file: "lib/mail/commands.ts",
    content: using("tests/unit/points/rules.test", "tested"),
  },
  {
    rules: ["5-components-know-the-pure-files"],
    file: "components/points/reads-commands.tsx",
    content: using("lib/points/commands", "saved"),
  },
  {
    rules: ["5-components-know-the-pure-files"],
    file: "components/points/reads-platform.tsx",
    content: using("lib/platform/database", "database"),
  },
  {
    rules: ["5-components-take-only-types-of-queries"],
    file: "components/points/reads-query.tsx",
    content: using("lib/points/queries", "listed"),
  },
  {
    rules: ["5-ui-knows-no-area"],
    file: "components/ui/reads-terms.tsx",
    content: using("lib/points/terms", "made"),
  },
  {
    rules: ["6-pages-never-write"],
    file: "app/points/page.tsx",
    content: using("lib/points/commands", "saved"),
  },
  {
    rules: ["6-http-is-for-app"],
    file: "components/points/reads-http.tsx",
    content: using("lib/http/route", "route"),
  },
  {
    rules: ["6-offline-is-for-components"],
    file: "app/reads-offline.tsx",
    content: using("lib/offline/queue", "made"),
  },
  {
    rules: ["6-cli-is-a-way-in"],
    file: "app/reads-cli.tsx",
    content: using("lib/cli/migrate", "made"),
  },
  {
    rules: ["7-queries-never-write"],
    file: "lib/sorting/queries.ts",
    content: using("lib/points/commands", "saved"),
  },
  {
    rules: ["7-offline-is-for-browsers"],
    file: "lib/offline/reads-queries.ts",
    content: using("lib/points/queries", "listed"),
  },
  {
    rules: ["8-where-next-appears"],
    file: "lib/points/queries/reads-next.ts",
    content: `import { headers } from "next/headers";\nexport const made = headers;\n`,
  },
  {
    rules: ["8-where-next-appears"],
    file: "lib/identity/commands.ts",
    content: `import { getServerSession } from "next-auth";\nexport const made = getServerSession;\n`,
  },
];
