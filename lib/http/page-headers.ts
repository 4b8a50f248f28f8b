/** Request headers that proxy.ts sets for pages, over whatever a client sent under these names. */
export const REQUEST_ID_HEADER = "x-request-id";
/** Path and query string of the page, to come back to after signing in. */
export const PATH_HEADER = "x-page-path";
export const NONCE_HEADER = "x-nonce";
