/** Closed lists of what leaves the shed without becoming a piece. */

/** Disposed or passed on, never both. */
export const ROUTES = ["disposed", "passed-on"] as const;
export type Route = (typeof ROUTES)[number];

/** What a removal takes: the reject bin's content, or lots. */
export const REMOVAL_SOURCES = ["reject-bin", "stock"] as const;
export type RemovalSource = (typeof REMOVAL_SOURCES)[number];
