/** Destinations: who takes what leaves the shed. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  daySchema,
  idSchema,
  instantSchema,
  lineSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { ROUTES } from "../terms";

/** Text of one line that may be left empty. */
const maybeLine = (most: number) => z.string().trim().max(most, "too-long");

/**
 * A code of the List of Waste (Decision 2000/532/EC): six figures, a * where it is hazardous; "200139" comes out as
 * "20 01 39". Empty where no such list is in force.
 */
export const wasteCodeSchema = z.string().transform((text, check): string => {
  const bare = text.replace(/\s/g, "");
  if (bare === "") return "";
  const match = /^(\d{2})(\d{2})(\d{2})(\*?)$/.exec(bare);
  if (match) return `${match[1]} ${match[2]} ${match[3]}${match[4]}`;
  check.addIssue({ code: "custom", message: "not-a-waste-code" });
  return z.NEVER;
});

export const destinationDataSchema = z.object({
  name: lineSchema(80),
  route: z.enum(ROUTES),
  /** Receiver's registration or permit number. */
  receiverNumber: maybeLine(60),
  carrierName: maybeLine(80),
  carrierNumber: maybeLine(60),
  /** Last day on which the permits are good; null: without end, or not known. */
  permitUntil: daySchema.nullable(),
  wasteCode: wasteCodeSchema,
});
export type DestinationData = z.output<typeof destinationDataSchema>;

export const destinationSchema = z.object({
  id: idSchema<"destination">(),
  name: z.string(),
  route: z.enum(ROUTES),
  receiverNumber: z.string(),
  carrierName: z.string(),
  carrierNumber: z.string(),
  permitUntil: daySchema.nullable(),
  wasteCode: z.string(),
  retiredAt: instantSchema.nullable(),
});
export type Destination = z.output<typeof destinationSchema>;

export const listDestinationsEndpoint = endpoint({
  method: "GET",
  path: "/api/destinations",
  summary: "Destinations in use, by name.",
  permission: "removals.read",
  input: z.object({}),
  output: z.object({ items: z.array(destinationSchema) }),
});

export const addDestinationEndpoint = endpoint({
  method: "POST",
  path: "/api/destinations",
  summary: "Add a destination. Its id is the request's.",
  permission: "removals.manage",
  input: destinationDataSchema.extend({ requestId: requestIdSchema }),
  output: destinationSchema,
});

export const changeDestinationEndpoint = endpoint({
  method: "PUT",
  path: "/api/destinations/{destinationId}",
  summary: "Change a destination. Removals already saved keep what stood there then.",
  permission: "removals.manage",
  input: destinationDataSchema.extend({
    requestId: requestIdSchema,
    destinationId: idSchema<"destination">(),
  }),
  output: destinationSchema,
});

const retireInput = z.object({
  requestId: requestIdSchema,
  destinationId: idSchema<"destination">(),
});
export const retireDestinationEndpoint = endpoint({
  method: "POST",
  path: "/api/destinations/{destinationId}/retire",
  summary: "Take a destination out of the list; its removals stay.",
  permission: "removals.manage",
  input: retireInput,
  output: destinationSchema,
});
export const restoreDestinationEndpoint = endpoint({
  method: "POST",
  path: "/api/destinations/{destinationId}/restore",
  summary: "Bring a retired destination back.",
  permission: "removals.manage",
  input: retireInput,
  output: destinationSchema,
});
