/**
 * Codes on tags and labels: seven random symbols of Crockford's base 32 and one ISO 7064 MOD 37,36
 * check character, shown as K7Q2-9F4M.
 */

declare const bagCodeBrand: unique symbol;
/** Eight symbols, capitals, no hyphen, check character right. */
export type LabelCode = string & { readonly [bagCodeBrand]: true };

/** Crockford's base-32 symbols: no I, L, O, U. */
export const CODE_SYMBOLS = "0123456789ABCDEFGHJKMNPQRSTVWXYZ";
const CHECK_SYMBOLS = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ";

/**
 * ISO 7064 MOD 37,36 check character of a text of 0-9 and A-Z (the hybrid recursion: start at 36; add
 * the value, take modulo 36 with 0 as 36, double, modulo 37).
 *
 * @throws RangeError for a character outside 0-9A-Z
 */
export function checkCharacter3736(text: string): string {
  let p = 36;
  for (const symbol of text) {
    const value = CHECK_SYMBOLS.indexOf(symbol);
    if (value < 0) throw new RangeError(`${symbol} is not a symbol of ISO 7064 MOD 37,36`);
    p = (p + value) % 36 || 36;
    p = (p * 2) % 37;
  }
  return CHECK_SYMBOLS[(37 - p) % 36] ?? "";
}

export type CodeReading =
  | { ok: true; code: LabelCode }
  | { ok: false; problem: "empty" | "wrong-length" | "wrong-symbol" | "wrong-check" };

/**
 * Reads a code that a person typed. Case, spaces and hyphens do not matter; I and L read as 1, O as 0.
 */
export function readCode(text: string): CodeReading {
  const plain = text
    .toUpperCase()
    .replace(/[\s\u00a0\-\u2010-\u2015\u2212_]/g, "")
    .replace(/[IL]/g, "1")
    .replace(/O/g, "0");
  if (plain === "") return { ok: false, problem: "empty" };
  for (const symbol of plain) {
    if (!CODE_SYMBOLS.includes(symbol)) return { ok: false, problem: "wrong-symbol" };
  }
  if (plain.length !== 8) return { ok: false, problem: "wrong-length" };
  if (checkCharacter3736(plain.slice(0, 7)) !== plain[7])
    return { ok: false, problem: "wrong-check" };
  return { ok: true, code: plain as LabelCode };
}

/**
 * Reads what a scanner saw: the address printed on a tag, whatever its host, or a bare code.
 *
 * @returns null for a QR that is none of ours
 */
export function readScan(text: string): LabelCode | null {
  const address = /^https?:\/\/[^/\s]+\/b\/([^/?#\s]+)\/?$/i.exec(text.trim());
  const reading = readCode(address?.[1] ?? text);
  return reading.ok ? reading.code : null;
}

/** "K7Q29F4M" as "K7Q2-9F4M". */
export function formatCode(code: string): string {
  return `${code.slice(0, 4)}-${code.slice(4)}`;
}

/**
 * Draws a new code. A draw whose check character would be I, L, O or U is thrown away.
 *
 * @param randomInt returns a whole number from 0 up to, not including, its argument
 */
export function drawCode(randomInt: (below: number) => number): LabelCode {
  for (;;) {
    let text = "";
    for (let place = 0; place < 7; place += 1) text += CODE_SYMBOLS[randomInt(32)] ?? "0";
    const check = checkCharacter3736(text);
    if (CODE_SYMBOLS.includes(check)) return (text + check) as LabelCode;
  }
}

/** The seven random symbols as one number, 0 to 32^7 − 1: a draw that anybody can repeat. */
export function codeNumber(code: LabelCode): number {
  let number = 0;
  for (const symbol of code.slice(0, 7)) number = number * 32 + CODE_SYMBOLS.indexOf(symbol);
  return number;
}

/** What the QR of a tag holds: all in capitals, so that the symbol stays in alphanumeric mode. */
export function tagAddress(publicUrl: string, code: LabelCode): string {
  return `${publicUrl.replace(/\/+$/, "")}/B/${code}`.toUpperCase();
}
