/** A check weight on a scale, and a lead's word on a scale that was not confirmed. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { formatMilligrams } from "@/lib/core/mass";
import { dayOf, formatDay } from "@/lib/core/time";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type { checkScaleEndpoint, CheckReceipt, clearScaleEndpoint } from "../contract/checks";
import { getCheckWeight } from "../queries/check-weights";
import { isClearedOn, nextAttempt, scaleStateOn } from "../queries/checks";
import { requireScale } from "../queries/instruments";
import { getScale } from "../queries/scales";
import { judgeCheck } from "../rules/check";
import { checkReading } from "../rules/scale";
import { stepWords } from "../rules/reading";

/**
 * Records a check weight on a scale. It counts for readings from now on: what was booked before it keeps its basis.
 *
 * @throws AppError `unknown-scale`, `unknown-check-weight`, `check-weight-too-heavy`, `above-max`, `not-a-step`,
 *   `check-failed-twice` (a check may be repeated once)
 */
export function checkScale(
  ctx: Context,
  input: z.output<typeof checkScaleEndpoint.input>,
): CheckReceipt {
  allow(ctx, "scales.check");
  const doneBy = requirePerson(ctx);
  return once<CheckReceipt>(
    ctx,
    `POST /api/scales/${input.scaleId}/checks`,
    input.requestId,
    (tx) => {
      const scale = requireScale(tx, input.scaleId, ctx.now);
      const weight = getCheckWeight(tx, input.checkWeightId);
      if (!weight || weight.retiredAt !== null) {
        throw new AppError("unknown-check-weight", {}, ["checkWeightId"]);
      }
      const day = dayOf(ctx.now, requireScheme(tx).timeZone);
      if (scaleStateOn(tx, scale.id, day) === "failed") {
        throw new AppError("check-failed-twice", { scale: scale.name });
      }
      if (weight.massMilligrams > scale.maxMilligrams) {
        throw new AppError(
          "check-weight-too-heavy",
          {
            weight: weight.name,
            massKg: formatMilligrams(weight.massMilligrams),
            scale: scale.name,
            maxKg: formatMilligrams(scale.maxMilligrams),
          },
          ["checkWeightId"],
        );
      }
      const { readingMilligrams } = input;
      const readingKg = formatMilligrams(readingMilligrams);
      const shown = checkReading(scale, readingMilligrams);
      if (shown === "above-max") {
        throw new AppError(
          "above-max",
          { scale: scale.name, maxKg: formatMilligrams(scale.maxMilligrams), readingKg },
          ["readingMilligrams"],
        );
      }
      if (shown === "not-a-step") {
        throw new AppError("not-a-step", { step: stepWords(scale.dMilligrams), readingKg }, [
          "readingMilligrams",
        ]);
      }

      const verdict = judgeCheck(scale, weight.massMilligrams, readingMilligrams);
      const attempt = nextAttempt(tx, scale.id, day);
      prepared(
        tx.client,
        `insert into scale_checks (id, scale_id, check_weight_id, day, attempt, mass_mg, reading_mg, limit_mg, passed,
           done_by, occurred_at, recorded_at) values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
      ).run(
        input.requestId,
        scale.id,
        weight.id,
        day,
        attempt,
        weight.massMilligrams,
        readingMilligrams,
        verdict.limitMilligrams,
        Number(verdict.passed),
        doneBy,
        ctx.now,
        ctx.now,
      );
      recordAudit(tx, ctx, {
        action: "scales.check",
        subjectKind: "scale",
        subjectId: scale.id,
        fields: { checkId: input.requestId, day, attempt, readingMilligrams, ...verdict },
      });
      return {
        checkId: input.requestId,
        attempt,
        ...verdict,
        state: scaleStateOn(tx, scale.id, day),
      };
    },
  );
}

/**
 * Clears a scale for a day, with a note that says why its readings can be believed. Readings that were booked
 * before keep their basis; the day leaves the list for review.
 *
 * @throws AppError `not-found`, `future-time`, `scale-cleared-already`
 */
export function clearScale(
  ctx: Context,
  input: z.output<typeof clearScaleEndpoint.input>,
): z.output<typeof clearScaleEndpoint.output> {
  allow(ctx, "scales.clear");
  const clearedBy = requirePerson(ctx);
  return once<z.output<typeof clearScaleEndpoint.output>>(
    ctx,
    `POST /api/scales/${input.scaleId}/clearances`,
    input.requestId,
    (tx) => {
      const scale = getScale(tx, input.scaleId);
      if (!scale) throw new AppError("not-found");
      const { day, note } = input;
      if (day > dayOf(ctx.now, requireScheme(tx).timeZone)) {
        throw new AppError("future-time", { when: formatDay(day) }, ["day"]);
      }
      if (isClearedOn(tx, scale.id, day)) {
        throw new AppError("scale-cleared-already", { scale: scale.name, day: formatDay(day) });
      }
      prepared(
        tx.client,
        "insert into scale_clearances (scale_id, day, note, cleared_by, cleared_at) values (?, ?, ?, ?, ?)",
      ).run(scale.id, day, note, clearedBy, ctx.now);
      recordAudit(tx, ctx, {
        action: "scales.clear",
        subjectKind: "scale",
        subjectId: scale.id,
        fields: { day },
        personal: { note },
      });
      return { scaleId: scale.id, day, state: scaleStateOn(tx, scale.id, day) };
    },
  );
}
