/** zod schemas that several areas' contracts share. Messages are codes; messages.ts has the words. */
import * as z from "zod";
import { readCode, type LabelCode } from "./bag-code";
import { isUuidV7, type Id } from "./ids";
import { readDay, type Day, type Instant } from "./time";

/** A UUIDv7 of one noun. */
export function idSchema<Noun extends string>() {
  return z.string().refine(isUuidV7, "not-an-id") as unknown as z.ZodType<Id<Noun>, string>;
}

/** Made by the client; sending it twice gives the same answer. It is the id of the record made. */
export const requestIdSchema = z.string().refine(isUuidV7, "not-an-id");

export const daySchema = z
  .string()
  .refine((text) => readDay(text) !== null, "not-a-day") as unknown as z.ZodType<Day, string>;

/** Epoch milliseconds. */
export const instantSchema = z.number().int().min(0).max(8_640_000_000_000) as unknown as z.ZodType<
  Instant,
  number
>;

/** A label's code as typed or scanned; comes out in its stored form. */
export const codeSchema = z.string().transform((text, check): LabelCode => {
  const reading = readCode(text);
  if (reading.ok) return reading.code;
  check.addIssue({ code: "custom", message: reading.problem });
  return z.NEVER;
});

/** Text that a person types into one line: trimmed, 1 to `most` characters. */
export function lineSchema(most: number) {
  return z.string().trim().min(1, "empty").max(most, "too-long");
}

/** Why a record is corrected: for whoever reads its history. */
export const reasonSchema = z.string().trim().min(3, "too-short").max(500, "too-long");

/** A load of up to 100 tonnes in whole milligrams. */
export const milligramsSchema = z.number().int().min(0).max(100_000_000_000);

/** One reading of a scale: gross, and what is taken off it. */
export const readingSchema = z.object({
  grossMilligrams: milligramsSchema,
  /** A listed container: its stored tare counts, whatever the client believed it to be. */
  containerId: idSchema<"container">().nullable(),
  containerTareMilligrams: milligramsSchema,
  sackId: idSchema<"container">().nullable(),
  sackTareMilligrams: milligramsSchema,
});
export type ReadingInput = z.output<typeof readingSchema>;

/** What was taken later from what a corrected act had filled: named to whoever corrects. */
export const laterUsesSchema = z.object({
  /** Records that took from what it had filled, oldest first; `count` may be more. */
  uses: z.array(
    z.object({
      entryId: z.number().int(),
      /** The ledger's kind of entry. */
      kind: z.string(),
      /** "step:<id>" */
      subject: z.string(),
      occurredAt: instantSchema,
      grams: z.number().int(),
    }),
  ),
  count: z.number(),
});
export type LaterUses = z.output<typeof laterUsesSchema>;
