/** How scales stand today, and what their check weights said over time. */
import "server-only";
import type * as z from "zod";
import type { Id, ScaleId } from "@/lib/core/ids";
import { dayOf, type Day, type Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import type { scalesTodayEndpoint } from "../contract/checks";
import { dayState } from "../rules/check";
import type { ScaleDayState } from "../terms";
import { getScale, type Scale } from "./scales";

/** How a scale stands on a day, as the rules say it of its checks. For commands too. */
export function scaleStateOn(db: Readable, scaleId: ScaleId, day: Day): ScaleDayState {
  const passed = prepared(
    db.client,
    "select passed from scale_checks where scale_id = ? and day = ? order by attempt",
  )
    .pluck()
    .all(scaleId, day) as number[];
  return dayState(
    passed.map((one) => one === 1),
    isClearedOn(db, scaleId, day),
  );
}

export function isClearedOn(db: Readable, scaleId: ScaleId, day: Day): boolean {
  return (
    prepared(db.client, "select 1 from scale_clearances where scale_id = ? and day = ?").get(
      scaleId,
      day,
    ) !== undefined
  );
}

/** Number of the check that comes next on a scale's day. */
export function nextAttempt(db: Readable, scaleId: ScaleId, day: Day): number {
  return prepared(
    db.client,
    "select coalesce(max(attempt), 0) + 1 from scale_checks where scale_id = ? and day = ?",
  )
    .pluck()
    .get(scaleId, day) as number;
}

/** How each scale in use stands today, by number. */
export function listScalesToday(
  ctx: Context,
  _input: z.output<typeof scalesTodayEndpoint.input> = {},
): z.output<typeof scalesTodayEndpoint.output> {
  allow(ctx, "scales.read");
  return inSnapshot(ctx, (db) => {
    const day = dayOf(ctx.now, requireScheme(db).timeZone);
    const scales = prepared(
      db.client,
      "select id as scaleId, name from scales where retired_at is null order by number",
    ).all() as { scaleId: ScaleId; name: string }[];
    return {
      day,
      items: scales.map((scale) => ({ ...scale, state: scaleStateOn(db, scale.scaleId, day) })),
    };
  });
}

export type ScaleCheckView = {
  id: string;
  day: Day;
  attempt: number;
  checkWeightId: Id<"check-weight">;
  weightName: string;
  massMilligrams: number;
  readingMilligrams: number;
  limitMilligrams: number;
  passed: boolean;
  byName: string;
  occurredAt: Instant;
};

export type Clearance = { day: Day; note: string; byName: string; at: Instant };

export type ScaleHistory = {
  scale: Scale;
  today: Day;
  state: ScaleDayState;
  /** Newest first; at most {@link MOST_CHECKS}. */
  checks: ScaleCheckView[];
  /** Newest first. */
  clearances: Clearance[];
};

/** A year of daily checks is drawn and listed. */
const MOST_CHECKS = 366;

/** A scale's checks and clearances; null for an unknown scale. */
export function getScaleHistory(ctx: Context, scaleId: ScaleId): ScaleHistory | null {
  allow(ctx, "scales.read");
  return inSnapshot<ScaleHistory | null>(ctx, (db) => {
    const scale = getScale(db, scaleId);
    if (!scale) return null;
    const today = dayOf(ctx.now, requireScheme(db).timeZone);
    const checks = prepared(
      db.client,
      `select c.id, c.day, c.attempt, c.check_weight_id as checkWeightId, w.name as weightName,
              c.mass_mg as massMilligrams, c.reading_mg as readingMilligrams, c.limit_mg as limitMilligrams,
              c.passed, p.name as byName, c.occurred_at as occurredAt
         from scale_checks c
         join check_weights w on w.id = c.check_weight_id
         join people p on p.id = c.done_by
        where c.scale_id = ? order by c.day desc, c.attempt desc limit ${MOST_CHECKS}`,
    ).all(scaleId) as (Omit<ScaleCheckView, "passed"> & { passed: number })[];
    const clearances = prepared(
      db.client,
      `select c.day, c.note, p.name as byName, c.cleared_at as at
         from scale_clearances c join people p on p.id = c.cleared_by
        where c.scale_id = ? order by c.day desc limit ${MOST_CHECKS}`,
    ).all(scaleId) as Clearance[];
    return {
      scale,
      today,
      state: scaleStateOn(db, scaleId, today),
      checks: checks.map((check) => ({ ...check, passed: check.passed === 1 })),
      clearances,
    };
  });
}
