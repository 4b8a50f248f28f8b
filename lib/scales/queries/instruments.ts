/** The scale and the tares that a reading names, as the lists have them, and whether the scale was checked that day. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, ScaleId } from "@/lib/core/ids";
import type { ReadingInput } from "@/lib/core/schemas";
import { dayOf, type Day, type Instant } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import type { TareKind } from "../terms";
import { getContainer, getScale, type Scale } from "./scales";

type Path = readonly (string | number)[];

/** A listed tare that is not what the client believed it to be: the stored one counts, and is told. */
export type TareChange = {
  part: TareKind;
  sentMilligrams: number;
  usedMilligrams: number;
};

/** In use when the scale was read: what left the lists since then is still good for a ticket that waited. */
function inUse(thing: { retiredAt: number | null }, occurredAt: Instant): boolean {
  return thing.retiredAt === null || thing.retiredAt > occurredAt;
}

/** @throws AppError `unknown-scale` */
export function requireScale(
  db: Readable,
  scaleId: ScaleId,
  occurredAt: Instant,
  path: Path = ["scaleId"],
): Scale {
  const scale = getScale(db, scaleId);
  if (!scale || !inUse(scale, occurredAt)) throw new AppError("unknown-scale", {}, path);
  return scale;
}

/** What a container weighed at a moment; before its first weighing, what that found. Milligrams. */
export function tareAt(db: Readable, containerId: Id<"container">, at: Instant): number | null {
  const found = prepared(
    db.client,
    `select tare_mg from container_tares where container_id = ?
      order by valid_from <= ? desc, case when valid_from <= ? then -valid_from else valid_from end limit 1`,
  )
    .pluck()
    .get(containerId, at, at) as number | undefined;
  return found ?? null;
}

/**
 * A reading whose listed tares are the lists' own, as they were when the scale was read. A typed tare is taken as
 * told.
 *
 * @param path of the reading in the input
 * @throws AppError `unknown-container`
 */
export function withListedTares(
  db: Readable,
  reading: ReadingInput,
  occurredAt: Instant,
  path: Path,
): { reading: ReadingInput; changes: TareChange[] } {
  const changes: TareChange[] = [];
  const listed = (part: TareKind, id: Id<"container"> | null, sentMilligrams: number): number => {
    if (id === null) return sentMilligrams;
    const container = getContainer(db, id);
    const usedMilligrams = container && tareAt(db, id, occurredAt);
    if (container?.kind !== part || usedMilligrams === null || !inUse(container, occurredAt)) {
      throw new AppError("unknown-container", {}, [...path, `${part}Id`]);
    }
    if (usedMilligrams !== sentMilligrams) changes.push({ part, sentMilligrams, usedMilligrams });
    return usedMilligrams;
  };
  const { containerId, containerTareMilligrams, sackId, sackTareMilligrams } = reading;
  return {
    reading: {
      ...reading,
      containerTareMilligrams: listed("container", containerId, containerTareMilligrams),
      sackTareMilligrams: listed("sack", sackId, sackTareMilligrams),
    },
    changes,
  };
}

/** How a scale stood on a day: its last check, and a lead's word where there is one. */
export function isConfirmedOn(db: Readable, scaleId: ScaleId, day: Day): boolean {
  const cleared = prepared(
    db.client,
    "select 1 from scale_clearances where scale_id = ? and day = ?",
  ).get(scaleId, day);
  if (cleared) return true;
  const passed = prepared(
    db.client,
    "select passed from scale_checks where scale_id = ? and day = ? order by attempt desc limit 1",
  )
    .pluck()
    .get(scaleId, day);
  return passed === 1;
}

/**
 * The basis of a reading: on a scale that was confirmed on that day, or not. A check that comes later in the day
 * does not change what was booked before it.
 */
export function basisOf(
  db: Readable,
  scaleId: ScaleId,
  occurredAt: Instant,
): "checked" | "unchecked" {
  const day = dayOf(occurredAt, requireScheme(db).timeZone);
  return isConfirmedOn(db, scaleId, day) ? "checked" : "unchecked";
}
