/**
 * A password is accepted by its length and by not being one of the first that anybody tries; what it is
 * made of is the person's own affair (OWASP ASVS 5.0, 6.2).
 */
import { LEAST_PASSWORD, MOST_PASSWORD } from "../terms";
import { COMMON_PASSWORDS } from "./common-passwords";

export type PasswordVerdict =
  | { ok: true; password: string }
  | { ok: false; problem: "password-too-short" | "password-too-long" | "password-too-common" };

/** One spelling for what looks the same: phones and laptops compose accents differently (NIST SP 800-63B). */
export function normalPassword(typed: string): string {
  return typed.normalize("NFKC");
}

const RUNS = ["01234567890123456789", "abcdefghijklmnopqrstuvwxyz", "qwertyuiopasdfghjklzxcvbnm"];

function isRun(plain: string): boolean {
  const backwards = Array.from(plain).reverse().join("");
  return RUNS.some((run) => run.includes(plain) || run.includes(backwards));
}

/** "aaaaaaaaaa", "abcabcabcabc": one short piece again and again. */
function isRepeated(plain: string): boolean {
  for (let length = 1; length <= 4; length += 1) {
    const piece = plain.slice(0, length);
    if (piece.repeat(Math.ceil(plain.length / length)).slice(0, plain.length) === plain)
      return true;
  }
  return false;
}

/**
 * @param typed as it was typed
 * @param own words that anybody would try for this person: name, mail address
 * @returns the password in its normal spelling, or what is wrong with it
 */
export function checkPassword(typed: string, own: readonly string[]): PasswordVerdict {
  const password = normalPassword(typed);
  const length = Array.from(password).length;
  if (length < LEAST_PASSWORD) return { ok: false, problem: "password-too-short" };
  if (length > MOST_PASSWORD) return { ok: false, problem: "password-too-long" };
  const plain = password.toLowerCase().replace(/\s+/g, "");
  const bare = plain.replace(/^[\d!?.*#_-]+|[\d!?.*#_-]+$/g, "");
  const owned = own.map((word) => word.toLowerCase().replace(/\s+/g, ""));
  const common =
    COMMON_PASSWORDS.has(plain) ||
    COMMON_PASSWORDS.has(bare) ||
    isRun(plain) ||
    isRepeated(plain) ||
    owned.some((word) => word.length >= 4 && (plain === word || bare === word));
  return common ? { ok: false, problem: "password-too-common" } : { ok: true, password };
}
