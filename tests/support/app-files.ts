/** The pages and handlers that really are under app/, by their addresses. */
import fs from "node:fs";
import path from "node:path";

const APP = path.resolve(import.meta.dirname, "../../app");

export type AppFile = { address: string; file: string };

/** "(shed)/stock/page.tsx" is "/stock". */
function addressOf(file: string): string {
  const parts = path.dirname(path.relative(APP, file)).split(path.sep);
  return `/${parts.filter((part) => part !== "." && !/^\(.*\)$/.test(part)).join("/")}`;
}

function find(name: string): AppFile[] {
  return fs
    .readdirSync(APP, { recursive: true, encoding: "utf8" })
    .filter((file) => path.basename(file) === name)
    .map((file) => path.join(APP, file))
    .map((file) => ({ address: addressOf(file), file }))
    .sort((a, b) => (a.address < b.address ? -1 : 1));
}

export const listPageFiles = (): AppFile[] => find("page.tsx");
export const listRouteFiles = (): AppFile[] => find("route.ts");
