/** Stock by polymer and colour. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { FORMS, KINDS, POLYMER_ANSWERS, WASH_STATES } from "@/lib/core/plastics";
import { COLOUR_LOOKS } from "../terms";

/** Each filter that is missing counts everything. */
export const stockFilterSchema = z.object({
  kind: z.enum(KINDS).optional(),
  form: z.enum(FORMS).optional(),
  wash: z.enum(WASH_STATES).optional(),
});
export type StockFilter = z.output<typeof stockFilterSchema>;

const gramsSchema = z.number().int();

export const stockCellSchema = z.object({
  polymer: z.enum(POLYMER_ANSWERS),
  colourCode: z.string(),
  /** On the shelf. */
  grams: gramsSchema,
  /** Promised to runs; never more than what is on the shelf. */
  reservedGrams: gramsSchema,
  /** Lots that hold something. */
  lots: z.number().int(),
});
export type StockCell = z.output<typeof stockCellSchema>;

export const stockColourSchema = z.object({
  code: z.string(),
  name: z.string(),
  hex: z.string(),
  look: z.enum(COLOUR_LOOKS),
});
export type StockColour = z.output<typeof stockColourSchema>;

export const stockSchema = z.object({
  /** Only combinations that hold something. */
  cells: z.array(stockCellSchema),
  /** The palette in its order, with retired colours that still hold something. */
  colours: z.array(stockColourSchema),
  /** Weighed in and waiting to be sorted. */
  unsorted: z.object({ bags: z.number().int(), grams: gramsSchema }),
  /** What stands in the reject bin. */
  rejectGrams: gramsSchema,
  /** Weighed in today. */
  today: z.object({ bags: z.number().int(), grams: gramsSchema }),
});
export type Stock = z.output<typeof stockSchema>;

export const stockEndpoint = endpoint({
  method: "GET",
  path: "/api/stock",
  summary:
    "What is on the shelf by polymer and colour: held, reserved, free; unsorted bags and the reject bin.",
  permission: "stock.read",
  input: stockFilterSchema,
  output: stockSchema,
});
