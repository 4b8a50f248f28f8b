/** Reads of the palette. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import type { Colour, listColoursEndpoint, listColoursSchema } from "../contract/palette";

const COLOUR = "code, name, hex, look, position, retired_at as retiredAt";

/** One colour, in use or retired. For commands and later areas too. */
export function getColour(db: Readable, code: string): Colour | null {
  const row = prepared(db.client, `select ${COLOUR} from colours where code = ?`).get(code);
  return (row as Colour | undefined) ?? null;
}

/** Every colour in the palette's order, retired ones last. */
export function readPalette(db: Readable): Colour[] {
  return prepared(
    db.client,
    `select ${COLOUR} from colours order by retired_at is not null, position, code`,
  ).all() as Colour[];
}

/** The palette; retired colours are in it, last, because old stock may still have them. */
export function listColours(
  ctx: Context,
  _input: z.output<typeof listColoursSchema> = {},
): z.output<typeof listColoursEndpoint.output> {
  allow(ctx, "stock.read");
  return { items: readPalette(ctx.db.reader) };
}

/** @throws AppError `unknown-colour`, also for a retired one: a form that was open since then must look again */
export function requireColourInUse(
  db: Readable,
  code: string,
  path: readonly (string | number)[],
): void {
  const colour = getColour(db, code);
  if (!colour || colour.retiredAt !== null) throw new AppError("unknown-colour", {}, path);
}
