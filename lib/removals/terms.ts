/** Closed lists of what leaves the shed without becoming a piece. */

/** Disposed or passed on, never both. */
export const ROUTES = ["disposed", "passed-on"] as const;
export type Route = (typeof ROUTES)[number];

/** What a removal takes: the reject bin's content, or lots. */
export const REMOVAL_SOURCES = ["reject-bin", "stock"] as const;
export type RemovalSource = (typeof REMOVAL_SOURCES)[number];

export const ROUTE_NAMES: Record<Route, string> = {
  disposed: "Disposed of",
  "passed-on": "Passed on",
};

/** Readings that one place's load can be weighed in. */
export const MOST_READINGS = 20;
/** Lots that one removal can take from. */
export const MOST_LOTS = 20;
