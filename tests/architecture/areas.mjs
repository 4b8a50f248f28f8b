/**
 * The one written list: an area of lib/ imports only areas before it. To call a later area from an
 * earlier one, move the shared thing earlier or compose in app.
 */
export const AREAS = [
  "core",
  "platform",
  "audit",
  "mail",
  "uploads",
  "identity",
  "devices",
  "points",
  "bags",
  "scales",
  "ledger",
  "stock",
  "weighing",
  "sorting",
  "removals",
  "production",
  "batches",
  "rounds",
  "imports",
  "reports",
];

/** Folders of lib/ that are edges of the program and no areas. */
export const EDGES = ["http", "offline", "cli"];

/** The five files (or folders) of an area. core and platform are one file for each topic instead. */
export const AREA_FILES = ["contract", "terms", "rules", "queries", "commands"];

/** What an area may hold besides the five, because a library asks for it. */
export const AREA_EXTRAS = { identity: ["auth.ts", "next-auth.d.ts"] };

/** Fewer modules than this were read: then the checker looked in the wrong place, and the check fails. */
export const LEAST_MODULES = 400;
