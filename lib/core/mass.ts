/**
 * Mass as whole numbers. The ledger holds integer grams, a scale's reading is integer milligrams;
 * no floating point touches a stored amount. Text becomes a number by its digits, never by parseFloat.
 */
import { readDecimal, type DecimalProblem } from "./decimal";

declare const gramsBrand: unique symbol;
declare const deltaBrand: unique symbol;

/** A mass of zero or more whole grams. */
export type Grams = number & { readonly [gramsBrand]: true };
/** A signed number of whole grams: what a ledger line moves. */
export type GramsDelta = number & { readonly [deltaBrand]: true };

/** The sole maker of {@link Grams}. Throws a RangeError for a negative, fractional or unsafe number. */
export function grams(value: number): Grams {
  if (!Number.isSafeInteger(value) || value < 0) {
    throw new RangeError(`${value} is not a whole number of grams`);
  }
  return value as Grams;
}

/** The sole maker of {@link GramsDelta}. Throws a RangeError for a fractional or unsafe number. */
export function gramsDelta(value: number): GramsDelta {
  if (!Number.isSafeInteger(value)) {
    throw new RangeError(`${value} is not a whole number of grams`);
  }
  return value as GramsDelta;
}

/** Milligrams to whole grams, half away from zero. Rounded once, on the net (product.md, The ledger). */
export function gramsFromMilligrams(milligrams: number): number {
  const sign = milligrams < 0 ? -1 : 1;
  return sign * Math.floor((Math.abs(milligrams) + 500) / 1000);
}

export type MassUnit = "kg" | "g";

export type MassReadingProblem = DecimalProblem;

export type MassReading =
  { ok: true; milligrams: number } | { ok: false; problem: MassReadingProblem };

/** Largest reading taken from text, in milligrams: 100 tonnes, far above any scale of a shed. */
const LARGEST_MILLIGRAMS = 100_000_000_000;

/**
 * Reads what a person typed for a weight.
 *
 * Decimal comma and decimal point both work; spaces and a trailing unit do not matter. A comma before
 * exactly three digits ("1,234") could be a thousand and is not guessed at; neither is a text with both
 * separators or with one of them twice.
 *
 * @param text what was typed, such as "2.340", "2,34" or "340 g"
 * @param unit the unit of a text that names none
 * @returns milligrams, or why not
 */
export function readMass(text: string, unit: MassUnit): MassReading {
  let rest = text.replace(/[\s\u00a0\u2009\u202f]/g, "").toLowerCase();
  let scale = unit;
  if (rest.endsWith("kg")) {
    scale = "kg";
    rest = rest.slice(0, -2);
  } else if (rest.endsWith("g")) {
    scale = "g";
    rest = rest.slice(0, -1);
  }
  const read = readDecimal(rest, scale === "kg" ? 6 : 3);
  if (!read.ok) return read;
  if (read.value > LARGEST_MILLIGRAMS) return { ok: false, problem: "too-large" };
  return { ok: true, milligrams: read.value };
}

/**
 * Grams as kilograms with three decimals, "2.160"; a minus sign is U+2212.
 *
 * @param value whole grams, may be negative
 * @param places decimals kept, 0 to 3 (half away from zero)
 */
export function formatKg(value: number, places: 0 | 1 | 2 | 3 = 3): string {
  const step = 10 ** (3 - places);
  const units = Math.floor((Math.abs(value) + step / 2) / step);
  const perKg = 10 ** places;
  const whole = Math.floor(units / perKg);
  const sign = value < 0 && units > 0 ? "\u2212" : "";
  const head = String(whole).replace(/\B(?=(\d{3})+(?!\d))/g, "\u2009");
  return places === 0
    ? sign + head
    : `${sign}${head}.${String(units % perKg).padStart(places, "0")}`;
}

/** Grams as a plain decimal number of kilograms for a CSV cell: "2.160", "-0.060". */
export function kgCell(value: number): string {
  const whole = Math.floor(Math.abs(value) / 1000);
  return `${value < 0 ? "-" : ""}${whole}.${String(Math.abs(value) % 1000).padStart(3, "0")}`;
}

/** Milligrams as kilograms, with as many decimals (3 to 6) as the value needs: "2.160", "0.0025". */
export function formatMilligrams(milligrams: number): string {
  const sign = milligrams < 0 ? "\u2212" : "";
  const size = Math.abs(milligrams);
  const fraction = String(size % 1_000_000)
    .padStart(6, "0")
    .replace(/0{1,3}$/, "");
  return `${sign}${Math.floor(size / 1_000_000)}.${fraction}`;
}

/** A scale's step or limit in the unit that its plate would use: "5 g", "0.5 g", "20 kg", "1.5 kg". */
export function formatStep(milligrams: number): string {
  const inKg = milligrams >= 1_000_000;
  const perUnit = inKg ? 1_000_000 : 1_000;
  const fraction = String(milligrams % perUnit)
    .padStart(inKg ? 6 : 3, "0")
    .replace(/0+$/, "");
  const whole = Math.floor(milligrams / perUnit);
  return `${whole}${fraction === "" ? "" : `.${fraction}`}\u00a0${inKg ? "kg" : "g"}`;
}
