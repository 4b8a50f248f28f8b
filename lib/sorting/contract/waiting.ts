/** Bags that wait to be sorted. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { POLYMER_ANSWERS } from "@/lib/core/plastics";
import { idSchema } from "@/lib/core/schemas";
import { COLOUR_LOOKS } from "@/lib/stock/terms";
import { CONDITIONS } from "@/lib/weighing/terms";
import { WAITING_BAGS_ADDRESS } from "../terms";

const waitingBagSchema = z.object({
  code: z.string(),
  pointName: z.string().nullable(),
  weighedAt: z.number().int(),
  netGrams: z.number().int(),
  condition: z.enum(CONDITIONS).nullable(),
  /** The guess at weigh-in; never a figure. */
  polymer: z.enum(POLYMER_ANSWERS).nullable(),
  /** The colour that was guessed with it. */
  colour: z.object({ name: z.string(), hex: z.string(), look: z.enum(COLOUR_LOOKS) }).nullable(),
  /** The first photo of its weigh-in. */
  photoId: z.string().nullable(),
  /** Picked at random to be sorted by itself, for its point's reject rate. */
  alone: z.boolean(),
  /** The session under way that has it on its table, and who changed it last. */
  draft: z.object({ id: z.string(), who: z.string() }).nullable(),
});
export type WaitingBag = z.output<typeof waitingBagSchema>;

/** What the list can be narrowed to. */
const waitingFilterSchema = z.object({
  pointId: idSchema<"point">().optional(),
  polymer: z.enum(POLYMER_ANSWERS).optional(),
  condition: z.enum(CONDITIONS).optional(),
  /** Words of the point's name. */
  point: z.string().trim().max(80, "too-long").optional(),
});
export type WaitingFilter = z.output<typeof waitingFilterSchema>;

export const waitingBagsEndpoint = endpoint({
  ...WAITING_BAGS_ADDRESS,
  summary:
    "Bags that wait to be sorted, oldest first, in pages; by point, likely polymer and condition.",
  permission: "sorting.record",
  input: waitingFilterSchema.extend({
    /** `next` of the page before. */
    after: z.string().max(80).optional(),
  }),
  output: z.object({
    bags: z.array(waitingBagSchema),
    next: z.string().nullable(),
    /** All that wait, whatever the filter. */
    waiting: z.object({ bags: z.number().int(), grams: z.number().int() }),
  }),
});
