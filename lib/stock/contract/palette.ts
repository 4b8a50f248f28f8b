/** The palette of colours: what goes over the wire. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { instantSchema, lineSchema, requestIdSchema } from "@/lib/core/schemas";
import { COLOUR_LOOKS } from "../terms";

/** A colour's code, as the ledger's materials name it. */
export const colourCodeSchema = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, "not-a-colour");

/** "#1f46d6"; comes out in small letters. */
export const hexSchema = z
  .string()
  .trim()
  .toLowerCase()
  .regex(/^#[0-9a-f]{6}$/, "not-a-hex");

export const colourSchema = z.object({
  code: z.string(),
  name: z.string(),
  hex: z.string(),
  look: z.enum(COLOUR_LOOKS),
  position: z.number().int(),
  retiredAt: instantSchema.nullable(),
});
export type Colour = z.output<typeof colourSchema>;

export const addColourSchema = z.object({
  requestId: requestIdSchema,
  name: lineSchema(40),
  hex: hexSchema,
  look: z.enum(COLOUR_LOOKS),
});
export const addColourEndpoint = endpoint({
  method: "POST",
  path: "/api/colours",
  summary: "Add a colour at the end of the palette.",
  permission: "palette.manage",
  input: addColourSchema,
  output: colourSchema,
});

export const changeColourSchema = addColourSchema.extend({ code: colourCodeSchema });
export const changeColourEndpoint = endpoint({
  method: "PATCH",
  path: "/api/colours/{code}",
  summary: "Change a colour's name, value or look. Its code stays.",
  permission: "palette.manage",
  input: changeColourSchema,
  output: colourSchema,
});

export const orderColoursSchema = z.object({
  requestId: requestIdSchema,
  /** Every colour in use, each once, in the new order. */
  codes: z.array(colourCodeSchema).min(1).max(200),
});
export const orderColoursEndpoint = endpoint({
  method: "PUT",
  path: "/api/colours",
  summary: "Put the palette in another order.",
  permission: "palette.manage",
  input: orderColoursSchema,
  output: z.object({ codes: z.array(z.string()) }),
});

export const retireColourSchema = z.object({ requestId: requestIdSchema, code: colourCodeSchema });
export const retireColourEndpoint = endpoint({
  method: "POST",
  path: "/api/colours/{code}/retire",
  summary: "Take a colour out of the choices. Stock of it stays and keeps its name.",
  permission: "palette.manage",
  input: retireColourSchema,
  output: colourSchema,
});
export const restoreColourEndpoint = endpoint({
  method: "POST",
  path: "/api/colours/{code}/restore",
  summary: "Bring a retired colour back, at the end of the palette.",
  permission: "palette.manage",
  input: retireColourSchema,
  output: colourSchema,
});

export const listColoursSchema = z.object({});
export const listColoursEndpoint = endpoint({
  method: "GET",
  path: "/api/colours",
  summary:
    "Every colour in the palette's order; retired ones, which old stock may still have, last.",
  permission: "stock.read",
  input: listColoursSchema,
  output: z.object({ items: z.array(colourSchema) }),
});
