/**
 * What the stock has for a piece: summed by the database over materials, so that thousands of lots cost little more
 * than a few.
 */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import { KINDS, type Form, type Kind, type WashState } from "@/lib/core/plastics";
import { addDays, dayOf, type Day } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { ownLoss } from "@/lib/stock/queries/own-loss";
import type { StepKind } from "@/lib/stock/terms";
import type { Piece } from "../contract/catalogue";
import type { ColourStock, PlanStock, planStockEndpoint } from "../contract/plans";
import { INTAKE_WEEKS } from "../rules/enough";
import { isUsable, stepsBefore } from "../rules/usable";
import type { Heatable } from "../terms";
import { getPiece } from "./catalogue";

/** Lots of a polymer by material, with what of them is promised and what was heated before. */
export const MATERIALS_SQL = `
  select m.id as materialId, r.colour_code as colourCode, r.kind, m.form, m.wash, sum(b.grams) as grams,
         sum(min(b.grams, coalesce((select sum(v.grams) from reservations v
                                     where v.lot_id = l.id and v.state = 'held'), 0))) as reservedGrams,
         sum(coalesce((select sum(p.grams) from parts p
                        where p.holder_id = b.holder_id and p.material_id = b.material_id and p.dim = 'H'
                          and p.key > 0), 0)) as heatedGrams
    from materials m
    join rows r on r.id = m.row_id
    join lots l on l.material_id = m.id
    join balances b on b.holder_id = l.holder_id and b.material_id = m.id
   where r.polymer = ? and b.grams > 0
   group by m.id`;

type MaterialStock = {
  materialId: number;
  colourCode: string;
  kind: Kind;
  form: Form;
  wash: WashState;
  grams: number;
  reservedGrams: number;
  heatedGrams: number;
};

/** Accepted grams of a polymer by kind, colour and day; below zero where more was taken back than came in. */
export const INTAKE_SQL = `
  select r.colour_code as colourCode, r.kind, t.day, sum(t.accepted) as grams
    from totals_day t join rows r on r.id = t.row_id
   where t.day >= ? and t.day < ? and r.polymer = ?
   group by r.colour_code, r.kind, t.day having sum(t.accepted) <> 0`;

type Intake = { colourCode: string; kind: Kind; day: Day; grams: number };

/** Grams of each of the last full weeks by colour, oldest first; weeks before the scheme's first entry are left out. */
function weeksOf(db: Readable, piece: Piece, polymer: Heatable, today: Day) {
  const first = prepared(db.client, "select min(day) from totals_day").pluck().get() as Day | null;
  const weeks = Array.from({ length: INTAKE_WEEKS }, (_, at) =>
    addDays(today, -7 * (INTAKE_WEEKS - at)),
  ).filter((start) => first !== null && start >= first);
  const from = weeks[0];
  const byColour = new Map<string, number[]>();
  if (!from) return { count: 0, byColour };
  for (const row of prepared(db.client, INTAKE_SQL).all(from, today, polymer) as Intake[]) {
    if (!piece.kinds.includes(row.kind)) continue;
    const of = byColour.get(row.colourCode) ?? weeks.map(() => 0);
    const at = weeks.findLastIndex((start) => start <= row.day);
    if (at >= 0) of[at] = (of[at] ?? 0) + row.grams;
    byColour.set(row.colourCode, of);
  }
  return { count: weeks.length, byColour };
}

/** Step by step, what the scheme itself keeps of a polymer, in thousandths. */
function keepsOf(db: Readable, polymer: Heatable): Record<StepKind, number> {
  const keeps = (kind: StepKind) => {
    const { mean } = ownLoss(db, kind, polymer);
    return mean === null ? 1000 : Math.round((1 - mean) * 1000);
  };
  return { washing: keeps("washing"), drying: keeps("drying"), shredding: keeps("shredding") };
}

/** @throws AppError `not-found` */
export function getPlanStock(
  ctx: Context,
  input: z.output<typeof planStockEndpoint.input>,
): PlanStock {
  allow(ctx, "production.read");
  return inSnapshot<PlanStock>(ctx, (db) => {
    const piece = getPiece(db, input.pieceId);
    if (!piece) throw new AppError("not-found");
    return readPlanStock(db, piece, input.polymer, dayOf(ctx.now, requireScheme(db).timeZone));
  });
}

export function readPlanStock(
  db: Readable,
  piece: Piece,
  polymer: Heatable,
  today: Day,
): PlanStock {
  const palette = prepared(
    db.client,
    `select code, name, hex, look, retired_at is not null as retired from colours order by position, code`,
  ).all() as (Pick<ColourStock, "code" | "name" | "hex" | "look"> & { retired: number })[];
  const materials = (prepared(db.client, MATERIALS_SQL).all(polymer) as MaterialStock[]).filter(
    ({ kind }) => piece.kinds.includes(kind),
  );
  const keeps = keepsOf(db, polymer);
  const kept = (steps: readonly StepKind[]): number =>
    steps.reduce((share, step) => (share * keeps[step]) / 1000, 1);
  const { count, byColour } = weeksOf(db, piece, polymer, today);
  // A retired colour is there as long as something of it is.
  const there = palette.filter(
    ({ code, retired }) => !retired || materials.some(({ colourCode }) => colourCode === code),
  );
  const colours = there.map(({ retired: _retired, ...colour }): ColourStock => {
    const own = materials.filter(({ colourCode }) => colourCode === colour.code);
    const usable = own.filter((material) => isUsable(piece.method, material));
    const bySteps = new Map<string, ColourStock["afterSteps"][number]>();
    for (const material of own) {
      const steps = stepsBefore(piece.method, material);
      if (steps === null || steps.length === 0) continue;
      const grams = Math.max(0, material.grams - material.reservedGrams);
      const known = bySteps.get(steps.join()) ?? { steps: [...steps], grams: 0, gives: 0 };
      known.grams += grams;
      known.gives += Math.floor(grams * kept(steps));
      bySteps.set(steps.join(), known);
    }
    const sum = (of: "grams" | "reservedGrams" | "heatedGrams") =>
      usable.reduce((all, material) => all + material[of], 0);
    return {
      ...colour,
      freeGrams: sum("grams") - sum("reservedGrams"),
      reservedGrams: sum("reservedGrams"),
      heatedGrams: sum("heatedGrams"),
      kinds: KINDS.filter((kind) => usable.some((material) => material.kind === kind)),
      afterSteps: [...bySteps.values()].filter(({ grams }) => grams > 0),
      weeks: byColour.get(colour.code) ?? Array.from({ length: count }, () => 0),
    };
  });
  const usual = stepsBefore(piece.method, { form: "whole", wash: "as-received" });
  // Nothing that is collected becomes a sheet by steps: of it no day can be told.
  const keepsThousandths = usual === null ? 0 : Math.round(kept(usual) * 1000);
  return { colours, keepsThousandths, today };
}
