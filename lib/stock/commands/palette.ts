/** Writes of the palette. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { sameName, tidyName } from "@/lib/core/names";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addColourSchema,
  changeColourSchema,
  Colour,
  orderColoursEndpoint,
  orderColoursSchema,
  retireColourSchema,
} from "../contract/palette";
import { getColour, readPalette } from "../queries/palette";
import { colourCode, isReordering } from "../rules/palette";
import { FIRST_PALETTE } from "../terms";

const INSERT = `insert into colours (code, name, hex, look, position, retired_at)
  values (?, ?, ?, ?, ?, null) on conflict (code) do nothing`;

/** A step of the scheme's first set-up. Colours that a coordinator changed since are left as they are. */
export function setUpPaletteIn(tx: Tx): void {
  const insert = prepared(tx.client, INSERT);
  FIRST_PALETTE.forEach(({ code, name, hex, look }, index) => {
    insert.run(code, name, hex, look, index + 1);
  });
}

/**
 * Adds a colour at the end of the palette; its code is made from this first name.
 *
 * @throws AppError `name-in-use`, also for the name of a retired colour
 */
export function addColour(ctx: Context, input: z.output<typeof addColourSchema>): Colour {
  allow(ctx, "palette.manage");
  return once(ctx, "POST /api/colours", input.requestId, (tx) => {
    const palette = readPalette(tx);
    const name = tidyName(input.name);
    requireFreeName(palette, name, null);
    const { hex, look } = input;
    const code = colourCode(name, new Set(palette.map((colour) => colour.code)));
    const position = lastPosition(palette) + 1;
    prepared(tx.client, INSERT).run(code, name, hex, look, position);
    recordColourAudit(tx, ctx, "palette.add", code, { hex, look }, { name });
    return { code, name, hex, look, position, retiredAt: null };
  });
}

/**
 * Changes a colour's name, value or look. Its code, which the ledger names, stays.
 *
 * @throws AppError `not-found`, `name-in-use`
 */
export function changeColour(ctx: Context, input: z.output<typeof changeColourSchema>): Colour {
  allow(ctx, "palette.manage");
  return once(ctx, `PATCH /api/colours/${input.code}`, input.requestId, (tx) => {
    const before = requireColour(tx, input.code);
    const name = tidyName(input.name);
    requireFreeName(readPalette(tx), name, before.code);
    const { hex, look } = input;
    prepared(tx.client, "update colours set name = ?, hex = ?, look = ? where code = ?").run(
      name,
      hex,
      look,
      before.code,
    );
    recordColourAudit(
      tx,
      ctx,
      "palette.change",
      before.code,
      { hex, look, hexBefore: before.hex, lookBefore: before.look },
      { name, nameBefore: before.name },
    );
    return { ...before, name, hex, look };
  });
}

/**
 * Puts the colours in use in another order.
 *
 * @throws AppError `colour-order` when the list is not just the colours in use, each once
 */
export function orderColours(
  ctx: Context,
  input: z.output<typeof orderColoursSchema>,
): z.output<typeof orderColoursEndpoint.output> {
  allow(ctx, "palette.manage");
  return once(ctx, "PUT /api/colours", input.requestId, (tx) => {
    const present = readPalette(tx).filter((colour) => colour.retiredAt === null);
    const codes = present.map((colour) => colour.code);
    if (!isReordering(codes, input.codes)) throw new AppError("colour-order");
    const update = prepared(tx.client, "update colours set position = ? where code = ?");
    input.codes.forEach((code, index) => update.run(index + 1, code));
    recordColourAudit(tx, ctx, "palette.order", "all", { codes: input.codes.join(" ") });
    return { codes: input.codes };
  });
}

/**
 * Takes a colour out of the choices; stock of it stays. Retiring a retired one changes nothing.
 *
 * @throws AppError `not-found`
 */
export function retireColour(ctx: Context, input: z.output<typeof retireColourSchema>): Colour {
  allow(ctx, "palette.manage");
  return once(ctx, `POST /api/colours/${input.code}/retire`, input.requestId, (tx) => {
    const colour = requireColour(tx, input.code);
    if (colour.retiredAt !== null) return colour;
    prepared(tx.client, "update colours set retired_at = ? where code = ?").run(
      ctx.now,
      colour.code,
    );
    recordColourAudit(tx, ctx, "palette.retire", colour.code, {});
    return { ...colour, retiredAt: ctx.now };
  });
}

/**
 * Brings a retired colour back, at the end of the palette.
 *
 * @throws AppError `not-found`
 */
export function restoreColour(ctx: Context, input: z.output<typeof retireColourSchema>): Colour {
  allow(ctx, "palette.manage");
  return once(ctx, `POST /api/colours/${input.code}/restore`, input.requestId, (tx) => {
    const colour = requireColour(tx, input.code);
    if (colour.retiredAt === null) return colour;
    const position = lastPosition(readPalette(tx)) + 1;
    prepared(tx.client, "update colours set retired_at = null, position = ? where code = ?").run(
      position,
      colour.code,
    );
    recordColourAudit(tx, ctx, "palette.restore", colour.code, {});
    return { ...colour, position, retiredAt: null };
  });
}

function lastPosition(palette: readonly Colour[]): number {
  return palette.reduce((last, colour) => Math.max(last, colour.position), 0);
}

function requireColour(tx: Tx, code: string): Colour {
  const colour = getColour(tx, code);
  if (!colour) throw new AppError("not-found");
  return colour;
}

function requireFreeName(palette: readonly Colour[], name: string, except: string | null): void {
  const taken = palette.find((other) => other.code !== except && sameName(other.name, name));
  if (taken) throw new AppError("name-in-use", { name: taken.name }, ["name"]);
}

function recordColourAudit(
  tx: Tx,
  ctx: Context,
  action: `palette.${"add" | "change" | "order" | "retire" | "restore"}`,
  code: string,
  fields: Readonly<Record<string, string>>,
  personal?: Readonly<Record<string, string>>,
): void {
  recordAudit(tx, ctx, { action, subjectKind: "colour", subjectId: code, fields, personal });
}
