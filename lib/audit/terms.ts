/** What the audit's actions are called. A test compares the list with what the commands write. */

/** First parts of actions, as the search offers them. */
export const AUDIT_AREAS = {
  people: "People",
  identity: "Signing in",
  points: "Drop-off points",
  tags: "Tag orders",
  bags: "Bags",
  weighing: "Weigh-ins",
  sorting: "Sorting",
  stock: "Stock",
  palette: "Palette",
  removals: "Removals",
  destinations: "Destinations",
  scales: "Scales",
  "check-weights": "Check weights",
  containers: "Containers and sacks",
  photos: "Photos",
  ledger: "The ledger",
} as const;

export const ACTION_WORDS = {} as const;
