import "server-only";
import { getBagByCode, getLabel, type Bag } from "@/lib/bags/queries";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { PersonId, PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import type { Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import { getBuiltInPoint } from "@/lib/points/queries";
import { basisOf, requireScale, withListedTares } from "@/lib/scales/queries/instruments";
import { netGramsOf, refuseReadings, type Refusal } from "@/lib/scales/rules/reading";
import { getColour } from "@/lib/stock/queries/palette";
import type { WeighInInput, WeighInReceipt } from "../contract/weigh-ins";
import { getPostedWeighIn, helperName, listLastNets } from "../queries/weigh-ins";
import {
  isFarAboveUsual,
  isInFuture,
  materialOf,
  missingOfMaterial,
  openQuestions,
  refuseTime,
  usualBag,
} from "../rules";
import type { Question } from "../terms";
import { keepForReview, postTicket, type KeptReceipt, type Ticket } from "./ticket";

/**
 * Weighs a bag in: gross less tare, summed over its readings, goes from its point's origin into the bag, and
 * for a bag of one kind on into its lot, as one act.
 *
 * A bag that was weighed already is never overwritten: the second reading is kept for review, outside the
 * ledger. What is implausible comes back as a question, and nothing is saved; the answer goes with the same
 * request id, to which photos may be bound already.
 *
 * @throws AppError `unknown-code`, `not-a-bag`, `bag-wrong-state`, `unknown-scale`, `unknown-container`,
 *   `unknown-colour`, `unknown-point`, `above-max`, `not-a-step`, `tare-above-gross`, `net-zero`, `too-long-ago`,
 *   `one-kind-needs-material`, `other-helper`
 */
export function weighBag(ctx: Context, input: WeighInInput): WeighInReceipt {
  allow(ctx, "weighing.record");
  const doneBy = requirePerson(ctx);
  if (input.helperId !== null && input.helperId !== doneBy) throw new AppError("other-helper");
  const kept = once<KeptReceipt>(
    ctx,
    "POST /api/weigh-ins",
    input.requestId,
    (tx) => weighBagIn(tx, ctx, doneBy, input),
    ({ kind }) => kind !== "ask",
  );
  if (kept.kind !== "kept-for-review") return kept;
  const { doneBy: who, ...earlier } = kept.earlier;
  return { ...kept, earlier: { ...earlier, who: helperName(ctx.db.reader, who) } };
}

function weighBagIn(tx: Tx, ctx: Context, doneBy: PersonId, input: WeighInInput): KeptReceipt {
  const bag = requireBag(tx, input.code);
  const scale = requireScale(tx, input.scaleId, input.occurredAt);
  const listed = input.readings.map((reading, index) =>
    withListedTares(tx, reading, input.occurredAt, ["readings", index]),
  );
  const readings = listed.map(({ reading }) => reading);
  const tareChanges = listed.flatMap(({ changes }, reading) =>
    changes.map((change) => ({ reading, ...change })),
  );
  refuse(refuseReadings(scale, readings));
  refuse(refuseTime(input.occurredAt, requireScheme(tx)));
  const missing = input.oneKind ? missingOfMaterial(input) : null;
  if (missing) throw new AppError("one-kind-needs-material", {}, [missing]);
  if (input.colourCode !== null && !getColour(tx, input.colourCode)) {
    throw new AppError("unknown-colour", {}, ["colourCode"]);
  }
  const pointId = bag.pointId ?? input.pointId ?? notKnown(tx);
  // The device's clock may be a little ahead; a record is never booked after it was written.
  const occurredAt = Math.min(input.occurredAt, ctx.now) as Instant;
  const ticket: Ticket = {
    ctx,
    doneBy,
    input,
    bag,
    scale,
    readings,
    pointId,
    occurredAt,
    netGrams: netGramsOf(readings),
    basis: basisOf(tx, scale.id, occurredAt),
  };

  const posted = getPostedWeighIn(tx, bag.id);
  if (posted) return keepForReview(tx, ticket, posted);
  const asked = questionsOf(tx, ticket);
  if (asked.length > 0) return { kind: "ask", questions: asked };
  return postTicket(tx, ticket, input.oneKind ? materialOf(input) : null, tareChanges);
}

function requireBag(tx: Tx, code: LabelCode): Bag {
  const bag = getBagByCode(tx, code);
  if (bag) return bag;
  const label = getLabel(tx, code);
  if (!label) throw new AppError("unknown-code", { code: formatCode(code) }, ["code"]);
  throw new AppError("not-a-bag", { code: formatCode(code), label: label.kind }, ["code"]);
}

function notKnown(tx: Tx): PointId {
  const point = getBuiltInPoint(tx, "not-known");
  if (!point) throw new AppError("unknown-point", {}, ["pointId"]);
  return point.id;
}

function refuse(refusal: Refusal | null): void {
  if (refusal) throw new AppError(refusal.code, refusal.detail, refusal.path);
}

function questionsOf(
  tx: Tx,
  ticket: Ticket,
): Extract<WeighInReceipt, { kind: "ask" }>["questions"] {
  const { input, ctx, netGrams } = ticket;
  const usualGrams = usualBag(listLastNets(tx, ticket.pointId));
  const raised: Question[] = [];
  if (isFarAboveUsual(netGrams, usualGrams)) raised.push("far-above-usual");
  if (isInFuture(input.occurredAt, ctx.now)) raised.push("future-time");
  return openQuestions(raised, input.confirmed).map((question) =>
    question === "far-above-usual"
      ? { question, netGrams, usualGrams: usualGrams ?? 0 }
      : { question, occurredAt: input.occurredAt, now: ctx.now },
  );
}
