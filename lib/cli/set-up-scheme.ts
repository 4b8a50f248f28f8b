/** A new scheme in an empty database: its settings and what every area starts with. */
import { randomBytes } from "node:crypto";
import { AppError } from "@/lib/core/errors";
import { isZone, type Day } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { findScheme } from "@/lib/platform/scheme";
import { setUpPointsIn } from "@/lib/points/commands";
import { setUpSortingIn } from "@/lib/sorting/commands/set-up";
import { setUpPaletteIn } from "@/lib/stock/commands/palette";

export type NewScheme = { name: string; timeZone: string; firstDay: Day };

/**
 * @throws AppError `scheme-exists` when the database holds a scheme already
 * @throws RangeError for a time zone that this machine does not know
 */
export function setUpSchemeIn(tx: Tx, ctx: Context, scheme: NewScheme): void {
  const existing = findScheme(tx);
  if (existing) throw new AppError("scheme-exists", { name: existing.name });
  if (!isZone(scheme.timeZone)) throw new RangeError(`${scheme.timeZone} is not a time zone`);
  prepared(
    tx.client,
    "insert into scheme (id, name, time_zone, first_day, note_salt, created_at) values (1, ?, ?, ?, ?, ?)",
  ).run(
    scheme.name,
    scheme.timeZone,
    scheme.firstDay,
    randomBytes(24).toString("base64url"),
    ctx.now,
  );
  setUpPointsIn(tx, ctx, ctx.now);
  setUpPaletteIn(tx);
  setUpSortingIn(tx);
}
