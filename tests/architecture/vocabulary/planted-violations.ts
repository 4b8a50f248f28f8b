/** One file for each vocabulary rule that breaks it, and files that break none. */

type Plant = { rule: string; file: string; content: string };

const lines = (count: number) => "export {};\n".repeat(count);
const server = 'import "server-only";\n';
// Written in pieces, so that this file does not itself hold what the rules look for.
const slash = "/";
const silence = ["@ts", "ignore"].join("-");
const disable = ["eslint", "disable"].join("-");

export const INNOCENT_FILES: Readonly<Record<string, string>> = {
  "app/(shed)/points/[pointId]/page.tsx": "export default function Page() {\n  return null;\n}\n",
  "components/ui/button.tsx": `export const address = "https://example.org${slash}home${slash}page";\n`,
  "lib/points/terms.ts":
    "// any word in a comment, as any reader knows\nexport const KINDS = [] as const;\n",
  "lib/points/queries.ts": `${server}import type { once } from "@/lib/platform/receipts";\nexport type Once = typeof once;\n`,
  "lib/points/commands/add-point.ts": `${server}import { once } from "@/lib/platform/receipts";\nexport const saved = (at: number) => [once, new Date(at)];\n`,
  "lib/identity/auth.ts": "export const auth = 1;\n",
  "lib/platform/database.ts":
    "export const run = (db: { transaction(work: () => void): void }) => db.transaction(() => {});\n",
  "lib/http/route.ts": "export const startedAt = Date.now();\n",
  "tests/unit/points/rules.test.ts": lines(300),
  "db/schema/points.ts": 'export const points = { onDelete: "restrict" };\n',
};

export const PLANTED_VIOLATIONS: readonly Plant[] = [
  { rule: "top-level", file: "src/points.ts", content: "export {};\n" },
  { rule: "top-level", file: "tests/everything/points.test.ts", content: "export {};\n" },
  { rule: "five-files", file: "lib/points/service.ts", content: "export {};\n" },
  { rule: "five-files", file: "lib/gadgets/rules.ts", content: "export {};\n" },
  { rule: "five-files", file: "lib/loose.ts", content: "export {};\n" },
  { rule: "five-files", file: "lib/points/auth.ts", content: "export {};\n" },
  { rule: "no-index", file: "components/points/index.ts", content: "export {};\n" },
  { rule: "no-grab-bag", file: "lib/core/utils.ts", content: "export {};\n" },
  { rule: "no-grab-bag", file: "components/helpers/point-card.tsx", content: "export {};\n" },
  { rule: "kebab-case", file: "components/points/PointCard.tsx", content: "export {};\n" },
  { rule: "kebab-case", file: "lib/core/bag_code.ts", content: "export {};\n" },
  { rule: "kebab-case", file: "app/(Shed)/page.tsx", content: "export {};\n" },
  { rule: "too-long", file: "lib/core/long.ts", content: lines(301) },
  {
    rule: "machine-path",
    file: "lib/cli/place.ts",
    content: `export const at = "${slash}home${slash}somebody";\n`,
  },
  {
    rule: "exact-versions",
    file: "package.json",
    content: '{ "dependencies": { "zod": "^4.6.7" } }\n',
  },
  {
    rule: "no-cascade",
    file: "db/migrations/0001_children.sql",
    content: "CREATE TABLE b (a integer REFERENCES a(id) ON DELETE cascade);\n",
  },
  {
    rule: "no-cascade",
    file: "db/schema/bags.ts",
    content: 'export const bags = { onDelete: "cascade" };\n',
  },
  { rule: "no-any", file: "lib/core/loose-type.ts", content: "export const loose = {} as any;\n" },
  {
    rule: "no-any",
    file: "components/points/loose-list.tsx",
    content: "export type Loose = Array<any>;\n",
  },
  { rule: "no-silencing", file: "lib/core/silent.ts", content: `// ${silence}\nexport {};\n` },
  { rule: "no-silencing", file: "lib/core/unlinted.ts", content: `/* ${disable} */\nexport {};\n` },
  { rule: "no-barrel", file: "lib/core/all.ts", content: 'export * from "./mass";\n' },
  { rule: "no-server-actions", file: "app/act.ts", content: '"use server";\nexport {};\n' },
  {
    rule: "no-server-actions",
    file: "app/inline.tsx",
    content: 'export async function act() {\n  "use server";\n}\n',
  },
  {
    rule: "one-way-to-write",
    file: "lib/points/commands/by-hand.ts",
    content: `${server}export const run = (db: { transaction(): void }) => db.transaction();\n`,
  },
  {
    rule: "no-watch",
    file: "components/points/point-form.tsx",
    content: "export const run = (form: { watch(): void }) => form.watch();\n",
  },
  {
    rule: "no-clock",
    file: "lib/points/rules.ts",
    content: "export const age = () => Date.now();\n",
  },
  {
    rule: "no-clock",
    file: "lib/points/commands/at-once.ts",
    content: `${server}export const at = () => new Date();\n`,
  },
  {
    rule: "queries-read",
    file: "lib/bags/queries.ts",
    content: `${server}import { once } from "@/lib/platform/receipts";\nexport const run = once;\n`,
  },
  { rule: "server-only", file: "lib/bags/commands.ts", content: "export {};\n" },
];
