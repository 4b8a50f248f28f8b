/** Sorting: what a client sends and reads. Readings are whole milligrams, nets whole grams. */
import * as z from "zod";
import { BAG_STATES } from "@/lib/bags/terms";
import { endpoint } from "@/lib/core/endpoint";
import { FORMS, KINDS, POLYMER_ANSWERS, POLYMERS, WASH_STATES } from "@/lib/core/plastics";
import {
  codeSchema,
  idSchema,
  instantSchema,
  laterUsesSchema,
  readingSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { LOSS_CAUSES } from "@/lib/ledger/terms";
import { SCALE_CLASSES } from "@/lib/scales/terms";
import { CONDITIONS } from "@/lib/weighing/terms";
import {
  BAG_TO_SORT_ADDRESS,
  CLOSE_SORTING_ADDRESS,
  CORRECT_SORTING_ADDRESS,
  MOST_BAGS,
  MOST_FRACTIONS,
  REJECT_REASONS_ADDRESS,
  SORTING_STATES,
  UNDO_SORTING_ADDRESS,
} from "../terms";

/** What a pile can be said to be: "Mixed, to sort" is not among them, it is what a bag is before. */
export const PILE_POLYMERS = [...POLYMERS, "not-sure"] as const;

export const pileSchema = z.object({
  polymer: z.enum(PILE_POLYMERS),
  colourCode: z.string().min(1).max(40),
  kind: z.enum(KINDS),
  form: z.enum(FORMS).default("whole"),
  wash: z.enum(WASH_STATES).default("as-received"),
  /** Number of the lot that it joins, or a new one; null: the one that is open for it, or opens by itself. */
  lot: z
    .union([z.literal("new"), z.number().int().min(1)])
    .nullable()
    .default(null),
  reading: readingSchema,
});
export type PileInput = z.output<typeof pileSchema>;

export const rejectSchema = z.object({
  reason: z.string().min(1).max(40),
  reading: readingSchema,
});
export type RejectInput = z.output<typeof rejectSchema>;

/** What was weighed on the table and said of it. */
const tableSchema = z.object({
  scaleId: idSchema<"scale">(),
  /** When the piles were weighed. */
  occurredAt: instantSchema,
  piles: z.array(pileSchema).max(MOST_FRACTIONS),
  rejects: z.array(rejectSchema).max(MOST_FRACTIONS),
  /** Where what is missing went; needed only when the scale cannot explain it. */
  cause: z.enum(LOSS_CAUSES).nullable().default(null),
  /** The piles are heavier than the scale can explain, were weighed again, and it stays so. */
  confirmedAbove: z.boolean().default(false),
});
export type TableInput = z.output<typeof tableSchema>;

export const closeSortingSchema = tableSchema.extend({
  /** Made by the client; the id of the sorting, and of its draft where there is one. */
  requestId: requestIdSchema,
  /** The tags of the bags that were tipped, of any points. */
  codes: z.array(codeSchema).min(1, "no-bags").max(MOST_BAGS, "too-many"),
});
export type CloseSortingInput = z.output<typeof closeSortingSchema>;

export const sortingReceiptSchema = z.object({
  sortingId: idSchema<"sorting">(),
  codes: z.array(z.string()),
  netGrams: z.number().int(),
  acceptedGrams: z.number().int(),
  rejectedGrams: z.number().int(),
  /** Net less piles and rejects: positive when something is missing. */
  differenceGrams: z.number().int(),
  /** null: posted as weighing difference; else as loss of this cause. */
  cause: z.enum(LOSS_CAUSES).nullable(),
  lots: z.array(
    z.object({
      number: z.number().int(),
      /** It was opened by this sorting. */
      opened: z.boolean(),
      grams: z.number().int(),
      /** What the lot holds now. */
      heldGrams: z.number().int(),
    }),
  ),
  recordedAt: z.number().int(),
  undoUntil: z.number().int(),
});
export type SortingReceipt = z.output<typeof sortingReceiptSchema>;

export const closeSortingEndpoint = endpoint({
  ...CLOSE_SORTING_ADDRESS,
  summary: "Split one bag, or several tipped together, into piles and rejects.",
  permission: "sorting.record",
  input: closeSortingSchema,
  output: sortingReceiptSchema,
});

export const undoSortingSchema = z.object({
  requestId: requestIdSchema,
  id: idSchema<"sorting">(),
});
export const undoSortingEndpoint = endpoint({
  ...UNDO_SORTING_ADDRESS,
  summary:
    "Take a sorting back, within ten minutes and by whoever saved it. Lots that it opened stay.",
  permission: "sorting.record",
  input: undoSortingSchema,
  output: z.object({
    sortingId: idSchema<"sorting">(),
    codes: z.array(z.string()),
    bagState: z.enum(BAG_STATES),
  }),
});

export const correctSortingEndpoint = endpoint({
  ...CORRECT_SORTING_ADDRESS,
  summary:
    "Take a sorting back and say what should have stood there, as one act; it always goes through.",
  permission: "sorting.correct",
  input: z.object({
    /** Made by the client; the id of the sorting that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"sorting">(),
    reason: reasonSchema,
    /** null: the bags wait again. */
    replacement: tableSchema.nullable(),
  }),
  output: z.object({
    id: z.string(),
    receipt: sortingReceiptSchema.nullable(),
    codes: z.array(z.string()),
    later: laterUsesSchema,
  }),
});
export type CorrectSortingInput = z.output<(typeof correctSortingEndpoint)["input"]>;
export type CorrectSortingReceipt = z.output<(typeof correctSortingEndpoint)["output"]>;

const scaleSpecSchema = z.object({
  class: z.enum(SCALE_CLASSES),
  maxMilligrams: z.number().int(),
  eMilligrams: z.number().int().nullable(),
  dMilligrams: z.number().int(),
  statedAccuracyMilligrams: z.number().int().nullable(),
});

export const sortedFractionSchema = z.object({
  /** null for a reject. */
  pile: z
    .object({
      polymer: z.enum(POLYMER_ANSWERS),
      colourName: z.string(),
      colourHex: z.string(),
      colourLook: z.string(),
      kind: z.enum(KINDS),
      form: z.enum(FORMS),
      wash: z.enum(WASH_STATES),
      lotNumber: z.number().int(),
    })
    .nullable(),
  rejectName: z.string().nullable(),
  netGrams: z.number().int(),
});
export type SortedFraction = z.output<typeof sortedFractionSchema>;

export const sortedBagSchema = z.object({
  sortingId: idSchema<"sorting">(),
  state: z.enum(SORTING_STATES),
  netGrams: z.number().int(),
  differenceGrams: z.number().int(),
  cause: z.enum(LOSS_CAUSES).nullable(),
  fractions: z.array(sortedFractionSchema),
  byName: z.string(),
  recordedAt: z.number().int(),
  /** null when it is not the reader's to undo, or the time is over. */
  undoUntil: z.number().int().nullable(),
});
export type SortedBag = z.output<typeof sortedBagSchema>;

export const bagToSortSchema = z.object({
  /** Whose session answers: a draft on a shared phone belongs to one helper. */
  helperId: z.string(),
  code: z.string(),
  state: z.enum(BAG_STATES),
  pointName: z.string().nullable(),
  weighedAt: z.number().int().nullable(),
  condition: z.enum(CONDITIONS).nullable(),
  /** What the book holds for it, in grams: what the piles must add up to. */
  netGrams: z.number().int(),
  /** Each reading behind that net with the scale it was read on: they belong to the tolerance. */
  readings: z.array(z.object({ loadMilligrams: z.number().int(), scale: scaleSpecSchema })),
  scaleId: idSchema<"scale">().nullable(),
  /** The session under way that has it on its table, and who changed it last. */
  draft: z.object({ id: z.string(), who: z.string() }).nullable(),
  /** The last sorting of a bag that was sorted. */
  sorted: sortedBagSchema.nullable(),
});
export type BagToSort = z.output<typeof bagToSortSchema>;

export const bagToSortEndpoint = endpoint({
  ...BAG_TO_SORT_ADDRESS,
  summary:
    "One bag on the table: its net, the readings behind it, and its sorting once it is sorted.",
  permission: "sorting.record",
  input: z.object({ code: codeSchema }),
  output: bagToSortSchema,
});

export const rejectReasonSchema = z.object({
  code: z.string(),
  name: z.string(),
  /** Shows "Stop, gloves, set aside". */
  warning: z.boolean(),
});
export type RejectReason = z.output<typeof rejectReasonSchema>;

export const rejectReasonsEndpoint = endpoint({
  ...REJECT_REASONS_ADDRESS,
  summary: "Reasons for turning something away, in their order.",
  permission: "sorting.record",
  input: z.object({}),
  output: z.object({ items: z.array(rejectReasonSchema) }),
});
