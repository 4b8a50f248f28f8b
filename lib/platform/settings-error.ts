/** What the readers of settings share. */

/** Thrown at start; the message names the variable and what to do. */
export class SettingsError extends Error {}

const LOOPBACK = new Set(["localhost", "127.0.0.1", "[::1]"]);

/** Does the address lead to this machine only? */
export function isLoopback(url: URL): boolean {
  return LOOPBACK.has(url.hostname);
}
