/** From what was sent to what is written: places, weights, the ledger's drafts, and the removal's row. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId, ScaleId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import { dayOf, middayOf, type Day, type Instant } from "@/lib/core/time";
import { ensureHolder } from "@/lib/ledger/commands/define";
import type { Draft } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import type { Line } from "@/lib/ledger/rules/split";
import { REJECT, type Basis } from "@/lib/ledger/terms";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { basisOf, requireScale, withListedTares } from "@/lib/scales/queries/instruments";
import type { Scale } from "@/lib/scales/queries/scales";
import {
  errorsOf,
  mpeOf,
  netGramsOf,
  refuseReadings,
  tareMilligrams,
  type Reading,
} from "@/lib/scales/rules/reading";
import { combinedTolerance } from "@/lib/scales/rules/scale";
import { REJECT_BIN_CODE } from "@/lib/sorting/terms";
import { askForReserved } from "@/lib/stock/queries/reserved";
import type { Destination } from "../contract/destinations";
import type { RemovalData, Taking } from "../contract/removals";
import { getDestination } from "../queries/destinations";
import { entriesOf, isFarAbove, movementOf, refuseDay, type Load, type Place } from "../rules";

type Path = readonly (string | number)[];

/** What is taken back in the same act, and where the input stands in its request. */
export type Correcting = { lines: readonly Line[]; destinationId: Id<"destination"> };

export type PlannedRemoval = {
  destination: Destination;
  occurredAt: Instant;
  basis: Basis;
  scaleId: ScaleId | null;
  grossMilligrams: number | null;
  tareMilligrams: number | null;
  grams: number;
  differenceGrams: number;
  /** Of the reject bin none. */
  lots: { lotId: LotId; grams: number }[];
  drafts: (subject: string) => Draft[];
};

type Weighed = {
  grams: number;
  mpeMilligrams: number | null;
  toleranceMilligrams: number;
  readings: readonly Reading[];
};

/**
 * @param correcting null for a new removal, which asks once about more than the book holds; a correction always goes
 *   through
 * @param at path of the data in the request
 * @throws AppError `unknown-destination`, `future-time`, `too-long-ago`, `unknown-scale`, `unknown-container`, what a
 *   reading is refused for, `not-found` for a lot, `removal-lot-twice`, `removal-nothing-there`, `removal-above-book`
 */
export function planRemoval(
  tx: Tx,
  ctx: Context,
  data: RemovalData,
  correcting: Correcting | null,
  at: Path = [],
): PlannedRemoval {
  const destination = requireDestination(tx, data.destinationId, correcting, at);
  const occurredAt = requireDay(tx, ctx, data.day, at);
  const { taking } = data;
  const scale =
    taking.how === "weighed"
      ? requireScale(tx, taking.scaleId, occurredAt, [...at, "taking", "scaleId"])
      : null;
  const basis = basisOfTaking(tx, taking, occurredAt);

  const seen = new Set<number>();
  const places = taking.loads.map(({ lotNumber }, index) => {
    const path = [...at, "taking", "loads", index];
    if (lotNumber === null) return { lotId: null, ...rejectBin(tx), where: "the reject bin" };
    if (seen.has(lotNumber)) throw new AppError("removal-lot-twice", { number: lotNumber }, path);
    seen.add(lotNumber);
    return requireLot(tx, lotNumber, [...path, "lotNumber"]);
  });
  const loads = places.map(({ lotId, where, ...place }, index) => {
    const lotNumber = taking.loads[index]?.lotNumber ?? null;
    const path = [...at, "taking", "loads", index];
    const { heldGrams, thenGrams } = bookOf(tx, place, correcting);
    const whole = isWhole(taking, index);
    const book = whole ? thenGrams : heldGrams;
    const weighed = weigh(tx, taking, index, scale, occurredAt, book, path);
    if (weighed.grams === 0) throw new AppError("removal-nothing-there", { where }, path);
    const load: Load = { heldGrams: book, takenGrams: weighed.grams, whole };
    if (!correcting && !data.confirmedAbove && isFarAbove(load, weighed.toleranceMilligrams)) {
      throw new AppError(
        "removal-above-book",
        {
          where,
          heldKg: formatKg(book),
          takenKg: formatKg(weighed.grams),
          surplusKg: formatKg(movementOf(load).surplusGrams),
        },
        [...at, "confirmedAbove"],
      );
    }
    if (!correcting && lotId !== null && lotNumber !== null) {
      const left = whole ? 0 : book - weighed.grams;
      askForReserved(tx, { lotId, number: lotNumber }, left, data.reservedToo ?? false, at);
    }
    return { lotId, place, load, weighed };
  });

  const readings = loads.flatMap(({ weighed }) => weighed.readings);
  return {
    destination,
    occurredAt,
    basis,
    scaleId: scale?.id ?? null,
    grossMilligrams:
      scale && readings.reduce((sum, { grossMilligrams }) => sum + grossMilligrams, 0),
    tareMilligrams: scale && readings.reduce((sum, reading) => sum + tareMilligrams(reading), 0),
    grams: loads.reduce((sum, { load }) => sum + load.takenGrams, 0),
    differenceGrams: loads.reduce((sum, { load }) => {
      const { remainderGrams, surplusGrams } = movementOf(load);
      return sum + remainderGrams - surplusGrams;
    }, 0),
    lots: loads.flatMap(({ lotId, load }) =>
      lotId === null ? [] : [{ lotId, grams: load.takenGrams }],
    ),
    drafts: (subject) =>
      loads.flatMap(({ place, load, weighed }) =>
        entriesOf(place, load, destination.route, {
          basis,
          scaleNumber: scale?.number ?? null,
          mpeMilligrams: weighed.mpeMilligrams,
        }).map(({ kind, lines }) => ({ kind, occurredAt, subject, lines })),
      ),
  };
}

/** A correction may keep a destination that has left the list since. */
function requireDestination(
  tx: Tx,
  id: Id<"destination">,
  correcting: Correcting | null,
  at: Path,
): Destination {
  const destination = getDestination(tx, id);
  const known = destination?.retiredAt === null || correcting?.destinationId === id;
  if (!destination || !known)
    throw new AppError("unknown-destination", {}, [...at, "destinationId"]);
  return destination;
}

/** Today's removal happens now; an earlier day is known without its hour. */
export function requireDay(tx: Tx, ctx: Context, day: Day, at: Path): Instant {
  const { timeZone, firstDay } = requireScheme(tx);
  const today = dayOf(ctx.now, timeZone);
  const refusal = refuseDay(day, today, firstDay);
  if (refusal) throw new AppError(refusal.code, refusal.detail, [...at, ...refusal.path]);
  return day === today ? ctx.now : middayOf(day, timeZone);
}

function basisOfTaking(tx: Tx, taking: Taking, occurredAt: Instant): Basis {
  switch (taking.how) {
    case "weighed":
      return basisOf(tx, taking.scaleId, occurredAt);
    case "stated":
      return "stated";
    case "book":
      return "estimated";
  }
}

function isWhole(taking: Taking, index: number): boolean {
  return taking.how === "book" || (taking.loads[index]?.whole ?? false);
}

const rejectBin = (tx: Tx): Place => ({
  account: "reject-bin",
  holderId: ensureHolder(tx, "reject-bin", REJECT_BIN_CODE),
  materialId: REJECT,
});

function requireLot(tx: Tx, number: number, path: Path): Place & { lotId: LotId; where: string } {
  const lot = prepared(
    tx.client,
    "select id as lotId, holder_id as holderId, material_id as materialId from lots where number = ?",
  ).get(number) as { lotId: LotId; holderId: number; materialId: number } | undefined;
  if (!lot) throw new AppError("not-found", {}, path);
  return { account: "lot", ...lot, where: `lot ${number}` };
}

/**
 * What the book has at a place once the act under correction is taken back (`held`), and what it had just before that
 * act (`then`): what came in since was not there to be emptied.
 */
function bookOf(
  tx: Tx,
  place: Place,
  correcting: Correcting | null,
): { heldGrams: number; thenGrams: number } {
  const now = heldBy(tx, place.holderId, place.materialId);
  const own = (correcting?.lines ?? []).filter(
    ({ holderId, materialId }) => holderId === place.holderId && materialId === place.materialId,
  );
  const heldGrams = Math.max(
    0,
    own.reduce((sum, line) => sum - line.grams, now),
  );
  const [first] = own;
  const before = first && first.after !== null ? first.after - first.grams : heldGrams;
  return { heldGrams, thenGrams: Math.min(heldGrams, before) };
}

function weigh(
  tx: Tx,
  taking: Taking,
  index: number,
  scale: Scale | null,
  occurredAt: Instant,
  bookGrams: number,
  path: Path,
): Weighed {
  if (taking.how === "weighed" && scale) {
    const readings = (taking.loads[index]?.readings ?? []).map(
      (reading, at) => withListedTares(tx, reading, occurredAt, [...path, "readings", at]).reading,
    );
    const refusal = refuseReadings(scale, readings);
    if (refusal) throw new AppError(refusal.code, refusal.detail, [...path, ...refusal.path]);
    return {
      grams: netGramsOf(readings),
      mpeMilligrams: mpeOf(scale, readings),
      toleranceMilligrams: combinedTolerance(errorsOf(scale, readings), scale.dMilligrams),
      readings,
    };
  }
  const grams = taking.how === "stated" ? (taking.loads[index]?.grams ?? 0) : bookGrams;
  return { grams, mpeMilligrams: null, toleranceMilligrams: 0, readings: [] };
}
