/** What several contracts of the stock share: a lot's number, one weighing, how much was taken, a count on the spot. */
import * as z from "zod";
import { idSchema, readingSchema } from "@/lib/core/schemas";
import { MOST_READINGS } from "../terms";

/** From a path, a query string or a body: "118". */
export const lotNumberSchema = z
  .union([z.number(), z.string().regex(/^\d{1,9}$/, "not-a-number")])
  .transform(Number)
  .pipe(z.number().int().min(1));

/** One weighing: a big bin is read in several goes, each with its own tare. */
export const weighedSchema = z.object({
  scaleId: idSchema<"scale">(),
  readings: z.array(readingSchema).min(1).max(MOST_READINGS),
});
export type WeighedInput = z.output<typeof weighedSchema>;

/** What was found in a container: its weight, or nothing. */
export const foundSchema = z.discriminatedUnion("found", [
  weighedSchema.extend({ found: z.literal("weighed") }),
  z.object({ found: z.literal("empty") }),
]);
export type FoundInput = z.output<typeof foundSchema>;

/** Milligrams and grams that a record of the stock says of a lot after it. */
export const lotAfterSchema = z.object({
  number: z.number().int(),
  heldGrams: z.number().int(),
});

/**
 * How much is taken from a lot.
 * - all: everything that the book holds; not weighed.
 * - taken: weighed as taken out; `all` when the container is empty now, so that the weighing is a count too.
 */
export const amountSchema = z.discriminatedUnion("how", [
  z.object({ how: z.literal("all") }),
  weighedSchema.extend({ how: z.literal("taken"), all: z.boolean().default(false) }),
]);
export type AmountInput = z.output<typeof amountSchema>;

/** What is left in the container: asked for when more was taken than the book held. */
export const onTheSpotSchema = foundSchema.nullable().default(null);
