/** Closed lists and fixed numbers of people's accounts. */

export const LINK_PURPOSES = ["invite", "reset"] as const;
export type LinkPurpose = (typeof LINK_PURPOSES)[number];

export const PERSON_STATES = ["invited", "joined"] as const;
export type PersonState = (typeof PERSON_STATES)[number];

export const ROLE_NAMES = {
  donor: "Donor",
  volunteer: "Volunteer",
  lead: "Lead",
  coordinator: "Coordinator",
} as const;

export const LEAST_PASSWORD = 10;
export const MOST_PASSWORD = 200;

const DAY_MS = 24 * 60 * 60 * 1000;
/** A mailed link works for a day. */
export const LINK_MS = DAY_MS;
/** A session ends this long after sign-in, whatever happens in between. */
export const SESSION_MS = 30 * DAY_MS;

/** The `__Host-` prefix makes a browser refuse the cookie unless it is secure and for this host alone. */
export function sessionCookieName(secure: boolean): string {
  return secure ? "__Host-bismar.session" : "bismar.session";
}
