/** Reads of destinations. */
import "server-only";
import type * as z from "zod";
import type { Id } from "@/lib/core/ids";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import type { Destination, listDestinationsEndpoint } from "../contract/destinations";

const DESTINATION = `id, name, route, receiver_number as receiverNumber, carrier_name as carrierName,
  carrier_number as carrierNumber, permit_until as permitUntil, waste_code as wasteCode, retired_at as retiredAt`;

/** One destination, in use or retired. */
export function getDestination(db: Readable, id: Id<"destination">): Destination | null {
  const row = prepared(db.client, `select ${DESTINATION} from destinations where id = ?`).get(id);
  return (row as Destination | undefined) ?? null;
}

/** Every destination, retired ones last. For commands too. */
export function readDestinations(db: Readable): Destination[] {
  const all = prepared(db.client, `select ${DESTINATION} from destinations`).all() as Destination[];
  return all.sort(
    (a, b) =>
      Number(a.retiredAt !== null) - Number(b.retiredAt !== null) ||
      a.name.localeCompare(b.name, "en", { numeric: true }),
  );
}

/** Destinations in use, by name. */
export function listDestinations(
  ctx: Context,
  _input: z.output<typeof listDestinationsEndpoint.input> = {},
): z.output<typeof listDestinationsEndpoint.output> {
  allow(ctx, "removals.read");
  return { items: readDestinations(ctx.db.reader).filter(({ retiredAt }) => retiredAt === null) };
}

/** Every destination, retired ones last. */
export function listManagedDestinations(ctx: Context): Destination[] {
  allow(ctx, "removals.manage");
  return readDestinations(ctx.db.reader);
}
