/** The places of the program and who finds which of them in the navigation. Pages ask for permission themselves. */
import type { Route } from "next";
import { mayRole, type Permission, type Role } from "@/lib/core/permissions";

export type PlaceId =
  | "today"
  | "weigh-in"
  | "sorting"
  | "stock"
  | "runs"
  | "catalogue"
  | "steps"
  | "counts"
  | "removals"
  | "reports"
  | "points"
  | "tags"
  | "scales"
  | "palette"
  | "people"
  | "audit"
  | "settings"
  | "account";

export type Place = { id: PlaceId; label: string; href: Route };

type Entry = { id: PlaceId; label: string; href: string; permission: Permission };

const ENTRIES: readonly Entry[] = [
  { id: "today", label: "Today", href: "/today", permission: "weighing.record" },
  { id: "weigh-in", label: "Weigh-in", href: "/weigh-in", permission: "weighing.record" },
  { id: "sorting", label: "Sorting", href: "/sorting", permission: "sorting.record" },
  { id: "stock", label: "Stock", href: "/stock", permission: "stock.read" },
  { id: "runs", label: "Runs", href: "/runs", permission: "production.read" },
  { id: "catalogue", label: "Catalogue", href: "/catalogue", permission: "production.read" },
  { id: "steps", label: "Steps", href: "/steps", permission: "steps.record" },
  { id: "counts", label: "Counts", href: "/counts", permission: "stock.review" },
  { id: "removals", label: "Taken away", href: "/removals", permission: "removals.read" },
  { id: "reports", label: "Reports", href: "/reports", permission: "reports.read" },
  { id: "points", label: "Drop-off points", href: "/points/manage", permission: "points.manage" },
  { id: "tags", label: "Tags", href: "/tags", permission: "tags.order" },
  { id: "scales", label: "Scales", href: "/scales", permission: "scales.read" },
  { id: "palette", label: "Palette", href: "/palette", permission: "palette.manage" },
  { id: "people", label: "People", href: "/people", permission: "people.manage" },
  { id: "audit", label: "Audit", href: "/audit", permission: "audit.read" },
  { id: "settings", label: "Settings", href: "/settings", permission: "settings.manage" },
  { id: "account", label: "Account", href: "/account", permission: "account.own" },
];

/** The four of the bottom bar, by what the role does most; the rest stands under "More". */
const IN_BAR: Record<Role, readonly PlaceId[]> = {
  donor: ["account"],
  volunteer: ["today", "weigh-in", "sorting", "stock"],
  lead: ["today", "weigh-in", "sorting", "stock"],
  coordinator: ["today", "weigh-in", "stock", "reports"],
};

function placeOf({ id, label, href }: Entry): Place {
  // The one place where a path becomes a Route by our word: the list is data, and tests open each path.
  return { id, label, href: href as Route };
}

/** Every place of a role, in the order of the rail. */
export function placesFor(role: Role): Place[] {
  return ENTRIES.filter((entry) => mayRole(role, entry.permission)).map(placeOf);
}

/** Up to four places for the bottom bar, and what goes under "More". */
export function barFor(role: Role): { bar: Place[]; more: Place[] } {
  const places = placesFor(role);
  const inBar = IN_BAR[role];
  return {
    bar: places.filter((place) => inBar.includes(place.id)),
    more: places.filter((place) => !inBar.includes(place.id)),
  };
}

/** Is the page at `path` this place or inside it? "/stock" holds "/stock/118" but not "/stocktake". */
export function isInPlace(path: string, href: string): boolean {
  return path === href || path.startsWith(`${href}/`);
}
