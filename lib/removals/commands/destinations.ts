/** Writes of destinations. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addDestinationEndpoint,
  changeDestinationEndpoint,
  Destination,
  DestinationData,
  retireDestinationEndpoint,
} from "../contract/destinations";
import { getDestination, readDestinations } from "../queries/destinations";

type DestinationId = Id<"destination">;

/** @throws AppError `name-in-use` */
export function addDestination(
  ctx: Context,
  input: z.output<typeof addDestinationEndpoint.input>,
): Destination {
  allow(ctx, "removals.manage");
  return once(ctx, "POST /api/destinations", input.requestId, (tx) => {
    const id = input.requestId as DestinationId;
    const name = tidyName(input.name);
    requireFreeName(readDestinations(tx), name, null);
    prepared(
      tx.client,
      `insert into destinations (id, name, route, receiver_number, carrier_name, carrier_number, permit_until,
         waste_code, created_at, retired_at) values (?, ?, ?, ?, ?, ?, ?, ?, ?, null)`,
    ).run(id, name, ...columnsOf(input), ctx.now);
    recordDestinationAudit(tx, ctx, "destinations.add", id, input);
    return requireDestination(tx, id);
  });
}

/**
 * Changes a destination. Removals already saved keep name, numbers and code as they were then.
 *
 * @throws AppError `not-found`, `name-in-use`
 */
export function changeDestination(
  ctx: Context,
  input: z.output<typeof changeDestinationEndpoint.input>,
): Destination {
  allow(ctx, "removals.manage");
  return once(ctx, `PUT /api/destinations/${input.destinationId}`, input.requestId, (tx) => {
    const { id } = requireDestination(tx, input.destinationId);
    const name = tidyName(input.name);
    requireFreeName(readDestinations(tx), name, id);
    prepared(
      tx.client,
      `update destinations set name = ?, route = ?, receiver_number = ?, carrier_name = ?, carrier_number = ?,
         permit_until = ?, waste_code = ? where id = ?`,
    ).run(name, ...columnsOf(input), id);
    recordDestinationAudit(tx, ctx, "destinations.change", id, input);
    return requireDestination(tx, id);
  });
}

/**
 * Takes a destination out of the list; its removals stay. Retiring a retired one changes nothing.
 *
 * @throws AppError `not-found`
 */
export function retireDestination(
  ctx: Context,
  input: z.output<typeof retireDestinationEndpoint.input>,
): Destination {
  allow(ctx, "removals.manage");
  return once(ctx, `POST /api/destinations/${input.destinationId}/retire`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.destinationId, ctx.now, "destinations.retire"),
  );
}

/**
 * Brings a retired destination back into the list.
 *
 * @throws AppError `not-found`
 */
export function restoreDestination(
  ctx: Context,
  input: z.output<typeof retireDestinationEndpoint.input>,
): Destination {
  allow(ctx, "removals.manage");
  return once(ctx, `POST /api/destinations/${input.destinationId}/restore`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.destinationId, null, "destinations.restore"),
  );
}

function setRetiredIn(
  tx: Tx,
  ctx: Context,
  id: DestinationId,
  retiredAt: Instant | null,
  action: "destinations.retire" | "destinations.restore",
): Destination {
  const destination = requireDestination(tx, id);
  if ((destination.retiredAt === null) === (retiredAt === null)) return destination;
  prepared(tx.client, "update destinations set retired_at = ? where id = ?").run(retiredAt, id);
  recordAudit(tx, ctx, { action, subjectKind: "destination", subjectId: id, fields: {} });
  return { ...destination, retiredAt };
}

function columnsOf(data: DestinationData) {
  return [
    data.route,
    data.receiverNumber,
    data.carrierName,
    data.carrierNumber,
    data.permitUntil,
    data.wasteCode,
  ] as const;
}

/** Names of firms can be names of people: they stand with the personal values. */
function recordDestinationAudit(
  tx: Tx,
  ctx: Context,
  action: "destinations.add" | "destinations.change",
  id: DestinationId,
  data: DestinationData,
): void {
  const { name, carrierName, receiverNumber, carrierNumber, route, permitUntil, wasteCode } = data;
  recordAudit(tx, ctx, {
    action,
    subjectKind: "destination",
    subjectId: id,
    fields: { route, receiverNumber, carrierNumber, permitUntil, wasteCode },
    personal: { name: tidyName(name), carrierName },
  });
}

function requireDestination(tx: Tx, id: DestinationId): Destination {
  const destination = getDestination(tx, id);
  if (!destination) throw new AppError("not-found");
  return destination;
}
