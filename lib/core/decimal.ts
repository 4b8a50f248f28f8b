/**
 * Reads a decimal number by its digits, never through a floating point number. Decimal comma and decimal point both
 * work; a text that could be a thousand or a fraction ("1,234") is not guessed at.
 */

export type DecimalProblem =
  "empty" | "not-a-number" | "could-be-thousands" | "negative" | "too-precise" | "too-large";

export type DecimalReading = { ok: true; value: number } | { ok: false; problem: DecimalProblem };

/**
 * @param text digits with at most one comma or point; no spaces, no unit
 * @param places decimals that count; more of them than zeros are refused
 * @returns the number times ten to the power of `places`, a whole number, or why not
 */
export function readDecimal(text: string, places: number): DecimalReading {
  if (text === "") return { ok: false, problem: "empty" };
  if (/^[-\u2212]/.test(text)) return { ok: false, problem: "negative" };
  if (/^[1-9]\d{0,2}(,\d{3})+$/.test(text)) return { ok: false, problem: "could-be-thousands" };
  if (/^[1-9]\d{0,2}(\.\d{3}){2,}$/.test(text) || /^\d+([.,]\d+){2,}$/.test(text)) {
    return { ok: false, problem: "could-be-thousands" };
  }
  const match = /^(\d*)(?:[.,](\d*))?$/.exec(text);
  if (!match || (match[1] === "" && (match[2] ?? "") === "")) {
    return { ok: false, problem: "not-a-number" };
  }
  const fraction = (match[2] ?? "").replace(/0+$/, "");
  if (fraction.length > places) return { ok: false, problem: "too-precise" };
  const digits = (match[1] ?? "") + fraction.padEnd(places, "0");
  if (digits.replace(/^0+/, "").length > 12) return { ok: false, problem: "too-large" };
  return { ok: true, value: Number(digits) };
}
