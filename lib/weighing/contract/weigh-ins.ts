/** Weighing bags in: what a client sends and reads. Masses are whole milligrams in, whole grams out. */
import * as z from "zod";
import { BAG_STATES, LABEL_KINDS } from "@/lib/bags/terms";
import { endpoint } from "@/lib/core/endpoint";
import { KINDS, POLYMER_ANSWERS } from "@/lib/core/plastics";
import {
  codeSchema,
  idSchema,
  instantSchema,
  readingSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import {
  CONDITIONS,
  MOST_READINGS,
  QUESTIONS,
  SCANNED_ADDRESS,
  TODAY_ADDRESS,
  UNDO_WEIGH_IN_ADDRESS,
  WEIGH_IN_ADDRESS,
  WEIGH_IN_STATES,
} from "../terms";

export const weighInInputSchema = z.object({
  /** Made by the client; the id of the weigh-in. */
  requestId: requestIdSchema,
  code: codeSchema,
  scaleId: idSchema<"scale">(),
  /** When the scale was read. */
  occurredAt: instantSchema,
  readings: z.array(readingSchema).min(1).max(MOST_READINGS),
  polymer: z.enum(POLYMER_ANSWERS).default("mixed"),
  kind: z.enum(KINDS).nullable().default(null),
  colourCode: z.string().min(1).max(40).nullable().default(null),
  /** The whole bag is one polymer, kind and colour: it goes straight into its lot. */
  oneKind: z.boolean().default(false),
  condition: z.enum(CONDITIONS).default("clean"),
  /** Where the bag comes from, for a tag that belongs to no point yet; else the tag's own point counts. */
  pointId: idSchema<"point">().nullable().default(null),
  /** Whose session it was typed in, where the client knows it: another's session cannot send it. */
  helperId: idSchema<"person">().nullable().default(null),
  /** Questions of an earlier answer that the person answered with yes. */
  confirmed: z.array(z.enum(QUESTIONS)).max(QUESTIONS.length).default([]),
});
export type WeighInInput = z.output<typeof weighInInputSchema>;

const postedSchema = z.object({
  kind: z.literal("posted"),
  weighInId: z.string(),
  code: z.string(),
  netGrams: z.number(),
  recordedAt: z.number(),
  undoUntil: z.number(),
  /** A reading lay under the scale's minimum capacity: accepted and marked. */
  belowMinimum: z.boolean(),
  /** Tares in which the list had another weight than the client; the list's was used. */
  tareChanges: z.array(
    z.object({
      reading: z.number(),
      part: z.enum(["container", "sack"]),
      sentMilligrams: z.number(),
      usedMilligrams: z.number(),
    }),
  ),
  /** The lot of a bag of one kind and what is in it now; null for a bag that waits for sorting. */
  lot: z.object({ id: z.string(), number: z.number(), grams: z.number() }).nullable(),
  /** What the bag was before, which an undo restores. */
  before: z.object({
    state: z.enum(BAG_STATES),
    since: z.number(),
    pointId: z.string().nullable(),
  }),
});

const keptSchema = z.object({
  kind: z.literal("kept-for-review"),
  weighInId: z.string(),
  code: z.string(),
  netGrams: z.number(),
  undoUntil: z.number(),
  /** The weighing that counts. */
  earlier: z.object({ who: z.string(), when: z.number(), netGrams: z.number() }),
});

const askSchema = z.object({
  kind: z.literal("ask"),
  questions: z.array(
    z.discriminatedUnion("question", [
      z.object({
        question: z.literal("far-above-usual"),
        netGrams: z.number(),
        /** Median of the point's last bags. */
        usualGrams: z.number(),
      }),
      z.object({
        question: z.literal("future-time"),
        occurredAt: z.number(),
        /** The server's clock, which a confirmed ticket gets. */
        now: z.number(),
      }),
    ]),
  ),
});

export const weighInReceiptSchema = z.discriminatedUnion("kind", [
  postedSchema,
  keptSchema,
  askSchema,
]);
export type WeighInReceipt = z.output<typeof weighInReceiptSchema>;

/** An outcome that keeps something is a receipt, never an error: throwing would roll it back. */
export const weighInEndpoint = endpoint({
  ...WEIGH_IN_ADDRESS,
  summary: "Weigh a bag in",
  permission: "weighing.record",
  input: weighInInputSchema,
  output: weighInReceiptSchema,
});

export const undoWeighInInputSchema = z.object({
  requestId: requestIdSchema,
  /** The weigh-in. */
  id: idSchema<"weigh-in">(),
});
export type UndoWeighInInput = z.output<typeof undoWeighInInputSchema>;

export const undoWeighInReceiptSchema = z.object({
  /** undone: taken back in the ledger. discarded: a second reading that never was in it. */
  kind: z.enum(["undone", "discarded"]),
  code: z.string(),
  bagState: z.enum(BAG_STATES),
});
export type UndoWeighInReceipt = z.output<typeof undoWeighInReceiptSchema>;

export const undoWeighInEndpoint = endpoint({
  ...UNDO_WEIGH_IN_ADDRESS,
  summary: "Take a weigh-in back, within ten minutes and by whoever saved it",
  permission: "weighing.record",
  input: undoWeighInInputSchema,
  output: undoWeighInReceiptSchema,
});

export const ticketSchema = z.object({
  id: z.string(),
  code: z.string(),
  pointName: z.string(),
  netGrams: z.number(),
  state: z.enum(WEIGH_IN_STATES),
  condition: z.enum(CONDITIONS),
  belowMinimum: z.boolean(),
  polymer: z.enum(POLYMER_ANSWERS),
  oneKind: z.boolean(),
  colourName: z.string().nullable(),
  lotNumber: z.number().nullable(),
  byName: z.string(),
  mine: z.boolean(),
  recordedAt: z.number(),
  /** null when it is not the reader's to undo, or is undone. */
  undoUntil: z.number().nullable(),
});
export type Ticket = z.output<typeof ticketSchema>;

export const todaySchema = z.object({
  /** Whose session answers: what waits on a phone is sent in its writer's session only. */
  helperId: z.string(),
  /** The server's clock; a phone's own may be wrong. */
  now: z.number(),
  timeZone: z.string(),
  /** In the ledger: second readings and undone ones are not counted. */
  bags: z.number(),
  netGrams: z.number(),
  /** Newest first, at most the number asked for. */
  tickets: z.array(ticketSchema),
  /** Tickets of the day in all. */
  ticketCount: z.number(),
});
export type Today = z.output<typeof todaySchema>;

export const todayEndpoint = endpoint({
  ...TODAY_ADDRESS,
  summary: "Today's weigh tickets",
  permission: "weighing.record",
  input: z.object({
    limit: z
      .string()
      .regex(/^[1-9]\d{0,2}$/, "not-a-number")
      .default("50"),
  }),
  output: todaySchema,
});
export type TodayInput = z.output<(typeof todayEndpoint)["input"]>;

export const scannedSchema = z.discriminatedUnion("kind", [
  z.object({
    kind: z.literal("bag"),
    id: z.string(),
    code: z.string(),
    state: z.enum(BAG_STATES),
    /** Epoch milliseconds; since when it is in its state. */
    since: z.number(),
    /** null: the tag was given to no point yet. */
    point: z.object({ id: z.string(), name: z.string() }).nullable(),
    /** The weighing that counts, if there is one. */
    weighIn: z
      .object({ id: z.string(), who: z.string(), when: z.number(), netGrams: z.number() })
      .nullable(),
  }),
  z.object({
    kind: z.literal("container"),
    id: z.string(),
    code: z.string(),
    name: z.string(),
    tareMilligrams: z.number(),
  }),
  z.object({ kind: z.literal("other"), code: z.string(), label: z.enum(LABEL_KINDS) }),
]);
export type Scanned = z.output<typeof scannedSchema>;

export const scannedEndpoint = endpoint({
  ...SCANNED_ADDRESS,
  summary: "What a scanned label stands for; for a bag, its point, age, state and weighing",
  permission: "bags.read",
  input: z.object({ code: codeSchema }),
  output: scannedSchema,
});
