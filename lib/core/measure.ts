/**
 * What is typed into a catalogue: lengths, volumes, small masses, shares, money, times, densities. Each is kept as a
 * whole number of its smallest unit; the first unit of a quantity is that of a text which names none.
 */
import * as z from "zod";
import { readDecimal } from "./decimal";

type Unit = { name: string; places: number };

/** `places`: decimals that the unit has in the smallest one. */
const QUANTITIES = {
  /** whole micrometres */
  length: [
    { name: "mm", places: 3 },
    { name: "cm", places: 4 },
  ],
  /** whole cubic millimetres */
  volume: [
    { name: "cm³", places: 3 },
    { name: "cm3", places: 3 },
    { name: "ml", places: 3 },
  ],
  /** whole milligrams */
  mass: [
    { name: "g", places: 3 },
    { name: "kg", places: 6 },
  ],
  /** whole thousandths */
  share: [{ name: "%", places: 1 }],
  /** whole hundredths */
  money: [{ name: "", places: 2 }],
  /** milligrams a cubic centimetre */
  density: [{ name: "g/cm³", places: 3 }],
} as const satisfies Record<string, readonly Unit[]>;
export type Quantity = keyof typeof QUANTITIES;

const LARGEST = 1_000_000_000;

/** The unit that a field of this quantity shows. */
export const unitOf = (quantity: Quantity): string => QUANTITIES[quantity][0].name;

const typedSchema = z.union([z.string().max(40), z.number()]);

type Check = { addIssue: (issue: { code: "custom"; message: string }) => void };

function read(quantity: Quantity, least: number, typed: string | number, check: Check): number {
  const refuse = (message: string): never => {
    check.addIssue({ code: "custom", message });
    return z.NEVER;
  };
  if (typeof typed === "number") {
    if (!Number.isInteger(typed)) return refuse("not-a-number");
    return typed < least || typed > LARGEST ? refuse("out-of-range") : typed;
  }
  const rest = typed.replace(/\s/g, "").toLowerCase();
  const units: readonly Unit[] = QUANTITIES[quantity];
  // The longest ending first: "kg" ends with "g".
  const unit =
    [...units]
      .sort((a, b) => b.name.length - a.name.length)
      .find(({ name }) => name !== "" && rest.endsWith(name)) ?? units[0];
  const digits =
    unit && rest.endsWith(unit.name) ? rest.slice(0, rest.length - unit.name.length) : rest;
  const reading = readDecimal(digits, unit?.places ?? 0);
  if (!reading.ok) return refuse(reading.problem);
  return reading.value < least || reading.value > LARGEST ? refuse("out-of-range") : reading.value;
}

/**
 * A field of a quantity: text as typed, or the whole number itself from a program; "20 cm" and "200" are both 200000.
 * Its issues are the codes of `fieldSentence`.
 */
export function measureSchema(quantity: Quantity, least = 1) {
  return typedSchema.transform((typed, check): number => read(quantity, least, typed, check));
}

/** The same where it may be left empty: null then. No union around it, which would swallow the codes. */
export function maybeMeasureSchema(quantity: Quantity, least = 1) {
  return typedSchema
    .nullable()
    .transform((typed, check): number | null =>
      typed === null || (typeof typed === "string" && typed.trim() === "")
        ? null
        : read(quantity, least, typed, check),
    );
}

/** The whole number as a field shows it, in the first unit and without it: 200000 µm is "200". */
export function formatMeasure(value: number | null, quantity: Quantity): string {
  if (value === null) return "";
  const { places } = QUANTITIES[quantity][0];
  const digits = String(value).padStart(places + 1, "0");
  const fraction = digits.slice(digits.length - places).replace(/0+$/, "");
  const whole = digits.slice(0, digits.length - places);
  const kept = quantity === "money" ? digits.slice(digits.length - places) : fraction;
  return kept === "" ? whole : `${whole}.${kept}`;
}
