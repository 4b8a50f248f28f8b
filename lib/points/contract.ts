/** Drop-off points: what goes over the wire. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { idSchema, instantSchema, lineSchema, requestIdSchema } from "@/lib/core/schemas";
import { CHOSEN_POINT_KINDS, POINT_KINDS } from "./terms";

export const pointNameSchema = lineSchema(80);

export const pointSchema = z.object({
  id: idSchema<"point">(),
  name: z.string(),
  kind: z.enum(POINT_KINDS),
  closedAt: instantSchema.nullable(),
});
export type PointReceipt = z.output<typeof pointSchema>;

export const addPointSchema = z.object({
  requestId: requestIdSchema,
  name: pointNameSchema,
  kind: z.enum(CHOSEN_POINT_KINDS),
});
export const addPointEndpoint = endpoint({
  method: "POST",
  path: "/api/points",
  summary: "Add a drop-off point. Its id is the request's.",
  permission: "points.manage",
  input: addPointSchema,
  output: pointSchema,
});

export const changePointSchema = addPointSchema.extend({ pointId: idSchema<"point">() });
export const changePointEndpoint = endpoint({
  method: "PATCH",
  path: "/api/points/{pointId}",
  summary: "Give a drop-off point another name or kind.",
  permission: "points.manage",
  input: changePointSchema,
  output: pointSchema,
});

export const closePointSchema = z.object({
  requestId: requestIdSchema,
  pointId: idSchema<"point">(),
});
export const closePointEndpoint = endpoint({
  method: "POST",
  path: "/api/points/{pointId}/close",
  summary: "Close a drop-off point: it leaves the lists, its bags and figures stay.",
  permission: "points.manage",
  input: closePointSchema,
  output: pointSchema,
});
export const reopenPointEndpoint = endpoint({
  method: "POST",
  path: "/api/points/{pointId}/reopen",
  summary: "Open a closed drop-off point again.",
  permission: "points.manage",
  input: closePointSchema,
  output: pointSchema,
});

export const listPointsSchema = z.object({});
export const listPointsEndpoint = endpoint({
  method: "GET",
  path: "/api/points",
  summary: "Open drop-off points by name, the two built-in ones first.",
  permission: "points.read",
  input: listPointsSchema,
  output: z.object({
    items: z.array(
      z.object({
        id: idSchema<"point">(),
        name: z.string(),
        kind: z.enum(POINT_KINDS),
        builtIn: z.boolean(),
      }),
    ),
  }),
});
