/** Kinds of drop-off point. The last two are not places: where a bag without a tag is entered. */
export const POINT_KINDS = [
  "library",
  "school",
  "cafe",
  "shop",
  "community-hall",
  "workplace",
  "boatyard",
  "sports-club",
  "market",
  "other",
  "shed",
  "not-known",
] as const;
export type PointKind = (typeof POINT_KINDS)[number];

export const POINT_KIND_NAMES: Record<PointKind, string> = {
  library: "Library",
  school: "School",
  cafe: "Café",
  shop: "Shop",
  "community-hall": "Community hall",
  workplace: "Workplace",
  boatyard: "Boatyard",
  "sports-club": "Sports club",
  market: "Market",
  other: "Other",
  shed: "At the shed",
  "not-known": "Not known",
};

/** Kinds that a coordinator can choose; the two others exist once each from the start. */
export const CHOSEN_POINT_KINDS = POINT_KINDS.slice(0, 10);
