/** A lot by its number, for whoever takes from it. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import type { LotToTake, lotToTakeEndpoint } from "../contract/removals";

type Row = {
  number: number;
  polymer: PolymerAnswer;
  kind: Kind;
  form: Form;
  wash: WashState;
  colourName: string;
  heldGrams: number;
};

/** One lot, or null. */
export function findLotToTake(ctx: Context, number: number): LotToTake | null {
  allow(ctx, "removals.record");
  const row = prepared(
    ctx.db.reader.client,
    `select l.number, r.polymer, r.kind, m.form, m.wash, coalesce(c.name, r.colour_code) as colourName,
            coalesce(b.grams, 0) as heldGrams
       from lots l
       join materials m on m.id = l.material_id
       join "rows" r on r.id = m.row_id
       left join colours c on c.code = r.colour_code
       left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id
      where l.number = ?`,
  ).get(number) as Row | undefined;
  if (!row) return null;
  return {
    number: row.number,
    name: pileName(row.colourName, row.polymer),
    detail: pileDetail(row),
    heldGrams: row.heldGrams,
  };
}

/** @throws AppError `not-found` */
export function getLotToTake(
  ctx: Context,
  input: z.output<typeof lotToTakeEndpoint.input>,
): LotToTake {
  const lot = findLotToTake(ctx, input.number);
  if (!lot) throw new AppError("not-found", {}, ["number"]);
  return lot;
}
