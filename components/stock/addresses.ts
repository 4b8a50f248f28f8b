/** Where the endpoints of lots are, for dialogs that send without carrying the contracts' schemas. */
export const COUNT = { method: "POST", path: "/api/lots/{number}/counts" } as const;
export const CLOSE = { method: "POST", path: "/api/lots/{number}/close" } as const;
export const CONTAINER = { method: "PUT", path: "/api/lots/{number}/container" } as const;
export const MERGE = { method: "POST", path: "/api/lots/{number}/merge" } as const;
export const SPLIT = { method: "POST", path: "/api/lots/{number}/split" } as const;
export const IDENTIFY = { method: "POST", path: "/api/lots/{number}/identify" } as const;
export const CORRECT_COUNT = { method: "POST", path: "/api/counts/{id}/correct" } as const;
export const ACCEPT_COUNT = { method: "POST", path: "/api/counts/{id}/accept" } as const;
export const CORRECT_MOVE = { method: "POST", path: "/api/lot-moves/{id}/correct" } as const;
export const LOTS = { method: "GET", path: "/api/lots" } as const;
export const LOT_BY_LABEL = { method: "GET", path: "/api/lots/by-label/{code}" } as const;
export const OPENING = { method: "POST", path: "/api/stock/openings" } as const;
