/** The workshop's catalogue: pieces, tools, machines, densities. Units are those of lib/core/measure.ts. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { maybeMeasureSchema, measureSchema } from "@/lib/core/measure";
import { KINDS } from "@/lib/core/plastics";
import { idSchema, lineSchema, requestIdSchema } from "@/lib/core/schemas";
import { HEATABLE, METHODS } from "../terms";
import { maybeShare, maybeWhole, setPointsSchema, share, whole } from "./fields";

export const pieceDataSchema = z
  .object({
    name: lineSchema(60),
    method: z.enum(METHODS),
    polymers: z.array(z.enum(HEATABLE)).min(1, "one-at-least"),
    kinds: z.array(z.enum(KINDS)).min(1, "one-at-least"),
    lengthUm: maybeMeasureSchema("length"),
    widthUm: maybeMeasureSchema("length"),
    thicknessUm: maybeMeasureSchema("length"),
    trimThousandths: maybeShare(0),
    piecesPerSheet: maybeWhole(1, 10_000),
    volumeMm3: maybeMeasureSchema("volume"),
    massMilligrams: maybeMeasureSchema("mass"),
    priceCents: maybeMeasureSchema("money", 0),
    otherCostCents: measureSchema("money", 0),
    mostHeatedThousandths: maybeShare(0),
  })
  .superRefine((piece, check) => {
    const { method } = piece;
    for (const field of ["lengthUm", "widthUm", "thicknessUm"] as const) {
      if (method !== "moulding" && piece[field] === null) {
        check.addIssue({ code: "custom", path: [field], message: "sheet-size" });
      }
    }
    const sized = piece.volumeMm3 !== null || piece.massMilligrams !== null;
    const both = piece.volumeMm3 !== null && piece.massMilligrams !== null;
    if (method !== "pressing" && (!sized || both)) {
      for (const field of ["massMilligrams", "volumeMm3"]) {
        check.addIssue({ code: "custom", path: [field], message: "mass-or-volume" });
      }
    }
    if (method === "cutting" && piece.piecesPerSheet === null) {
      check.addIssue({ code: "custom", path: ["piecesPerSheet"], message: "empty" });
    }
  });
export type PieceData = z.output<typeof pieceDataSchema>;

export const pieceSchema = z.object({
  id: idSchema<"piece">(),
  name: z.string(),
  method: z.enum(METHODS),
  polymers: z.array(z.enum(HEATABLE)),
  kinds: z.array(z.enum(KINDS)),
  lengthUm: z.number().nullable(),
  widthUm: z.number().nullable(),
  thicknessUm: z.number().nullable(),
  trimThousandths: z.number().nullable(),
  piecesPerSheet: z.number().nullable(),
  volumeMm3: z.number().nullable(),
  massMilligrams: z.number().nullable(),
  weighedMilligrams: z.number().nullable(),
  weighedPieces: z.number().nullable(),
  priceCents: z.number().nullable(),
  otherCostCents: z.number(),
  mostHeatedThousandths: z.number().nullable(),
  retiredAt: z.number().nullable(),
});
export type Piece = z.output<typeof pieceSchema>;

export const toolDataSchema = z.object({
  name: lineSchema(60),
  pieceId: idSchema<"piece">(),
  cavities: whole(1, 1000),
  gates: whole(1, 1000),
  runnerMilligrams: measureSchema("mass", 0),
  costCents: measureSchema("money", 0),
  preheatMinutes: whole(0, 1440),
  shotsBefore: whole(0, 100_000_000),
  serviceAtShots: maybeWhole(1, 100_000_000),
  startUpShots: whole(0, 1000),
  goodThousandths: share(),
});
export type ToolData = z.output<typeof toolDataSchema>;

export const toolSchema = z.object({
  id: idSchema<"tool">(),
  name: z.string(),
  pieceId: idSchema<"piece">(),
  cavities: z.number(),
  gates: z.number(),
  runnerMilligrams: z.number(),
  costCents: z.number(),
  preheatMinutes: z.number(),
  shotsBefore: z.number(),
  serviceAtShots: z.number().nullable(),
  startUpShots: z.number(),
  goodThousandths: z.number(),
  retiredAt: z.number().nullable(),
});
export type Tool = z.output<typeof toolSchema>;

export const machineDataSchema = z
  .object({
    name: lineSchema(60),
    method: z.enum(METHODS),
    plateLengthUm: maybeMeasureSchema("length"),
    plateWidthUm: maybeMeasureSchema("length"),
    barrelMm3: maybeMeasureSchema("volume"),
    usableThousandths: maybeShare(),
    leastShotMilligrams: maybeMeasureSchema("mass", 0),
    purgeMilligrams: maybeMeasureSchema("mass", 0),
    meltSeconds: whole(0, 86_400),
    cycleSeconds: whole(0, 86_400),
    ratedWatts: maybeWhole(1, 1_000_000),
    setPoints: setPointsSchema,
  })
  .superRefine((machine, check) => {
    const needs = (field: "plateLengthUm" | "plateWidthUm" | "barrelMm3" | "usableThousandths") => {
      if (machine[field] === null)
        check.addIssue({ code: "custom", path: [field], message: "empty" });
    };
    if (machine.method === "pressing") (["plateLengthUm", "plateWidthUm"] as const).forEach(needs);
    if (machine.method === "moulding") (["barrelMm3", "usableThousandths"] as const).forEach(needs);
  });
export type MachineData = z.output<typeof machineDataSchema>;

export const machineSchema = z.object({
  id: idSchema<"machine">(),
  name: z.string(),
  method: z.enum(METHODS),
  plateLengthUm: z.number().nullable(),
  plateWidthUm: z.number().nullable(),
  barrelMm3: z.number().nullable(),
  usableThousandths: z.number().nullable(),
  leastShotMilligrams: z.number().nullable(),
  purgeMilligrams: z.number().nullable(),
  meltSeconds: z.number(),
  cycleSeconds: z.number(),
  ratedWatts: z.number().nullable(),
  setPoints: z.array(z.object({ polymer: z.enum(HEATABLE), celsius: z.number() })),
  retiredAt: z.number().nullable(),
});
export type Machine = z.output<typeof machineSchema>;

/** A polymer's density as planning uses it: the reference's, or the scheme's own. */
export const densitySchema = z.object({
  polymer: z.enum(HEATABLE),
  mgPerCm3: z.number(),
  source: z.string(),
  own: z.boolean(),
});
export type Density = z.output<typeof densitySchema>;

export const catalogueSchema = z.object({
  pieces: z.array(pieceSchema),
  tools: z.array(toolSchema),
  machines: z.array(machineSchema),
  densities: z.array(densitySchema),
});
export type Catalogue = z.output<typeof catalogueSchema>;

export const getCatalogueEndpoint = endpoint({
  method: "GET",
  path: "/api/catalogue",
  summary:
    "What the workshop makes, with which tools and machines, and the densities it plans with.",
  permission: "production.read",
  input: z.object({}),
  output: catalogueSchema,
});

export const addPieceEndpoint = endpoint({
  method: "POST",
  path: "/api/pieces",
  summary: "Adds a piece to the catalogue.",
  permission: "production.catalogue",
  input: pieceDataSchema.and(z.object({ requestId: requestIdSchema })),
  output: pieceSchema,
});
export const changePieceEndpoint = endpoint({
  method: "PUT",
  path: "/api/pieces/{pieceId}",
  summary: "Changes a piece; runs that were planned keep their figures.",
  permission: "production.catalogue",
  input: pieceDataSchema.and(
    z.object({ requestId: requestIdSchema, pieceId: idSchema<"piece">() }),
  ),
  output: pieceSchema,
});
export const weighedPiecesSchema = z
  .object({ count: whole(1, 1000), milligrams: measureSchema("mass") })
  // A mean below one milligram is no piece.
  .refine(({ count, milligrams }) => milligrams >= count, {
    path: ["milligrams"],
    error: "out-of-range",
  });
export const weighPiecesEndpoint = endpoint({
  method: "POST",
  path: "/api/pieces/{pieceId}/mass",
  summary: "Good pieces weighed together: their mean replaces the computed mass.",
  permission: "production.catalogue",
  input: weighedPiecesSchema.and(
    z.object({ requestId: requestIdSchema, pieceId: idSchema<"piece">() }),
  ),
  output: pieceSchema,
});

export const addToolEndpoint = endpoint({
  method: "POST",
  path: "/api/tools",
  summary: "Adds a tool of a piece.",
  permission: "production.catalogue",
  input: toolDataSchema.extend({ requestId: requestIdSchema }),
  output: toolSchema,
});
export const changeToolEndpoint = endpoint({
  method: "PUT",
  path: "/api/tools/{toolId}",
  summary: "Changes a tool.",
  permission: "production.catalogue",
  input: toolDataSchema.extend({ requestId: requestIdSchema, toolId: idSchema<"tool">() }),
  output: toolSchema,
});

export const addMachineEndpoint = endpoint({
  method: "POST",
  path: "/api/machines",
  summary: "Adds a machine.",
  permission: "production.catalogue",
  input: machineDataSchema.and(z.object({ requestId: requestIdSchema })),
  output: machineSchema,
});
export const changeMachineEndpoint = endpoint({
  method: "PUT",
  path: "/api/machines/{machineId}",
  summary: "Changes a machine and its temperatures.",
  permission: "production.catalogue",
  input: machineDataSchema.and(
    z.object({ requestId: requestIdSchema, machineId: idSchema<"machine">() }),
  ),
  output: machineSchema,
});

export const ownDensitySchema = z
  .object({
    /** Nothing that is heated here is lighter than 0.5 or heavier than 3 g/cm³. */
    mgPerCm3: maybeMeasureSchema("density", 500).refine(
      (density) => density === null || density <= 3000,
      "out-of-range",
    ),
    source: z.string().trim().max(120, "too-long"),
  })
  .refine(({ mgPerCm3, source }) => mgPerCm3 === null || source !== "", {
    path: ["source"],
    error: "empty",
  });

export const setDensityEndpoint = endpoint({
  method: "PUT",
  path: "/api/densities/{polymer}",
  summary:
    "Sets the scheme's own density of a polymer with its source; empty goes back to the reference.",
  permission: "production.catalogue",
  input: ownDensitySchema.and(z.object({ requestId: requestIdSchema, polymer: z.enum(HEATABLE) })),
  output: densitySchema,
});
