/** Correcting a weigh-in, and letting a second reading stand in the place of the first: each one act. */
import "server-only";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { moveBagIn, restoreBagIn } from "@/lib/bags/commands/move-bag";
import { getBagById, type Bag } from "@/lib/bags/queries";
import type { BagState } from "@/lib/bags/terms";
import { AppError } from "@/lib/core/errors";
import type { WeighInId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import type { LaterUses } from "@/lib/core/schemas";
import { correctAct, postAct } from "@/lib/ledger/commands/post";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import { getPoint } from "@/lib/points/queries";
import { basisOf, requireScale, withListedTares } from "@/lib/scales/queries/instruments";
import { getScale } from "@/lib/scales/queries/scales";
import { isBelowMinimum, mpeOf, netGramsOf, refuseReadings } from "@/lib/scales/rules/reading";
import { getColour } from "@/lib/stock/queries/palette";
import type {
  CorrectWeighInInput,
  CorrectWeighInReceipt,
  ReviewReadingInput,
} from "../contract/corrections";
import { getStoredWeighIn, type StoredWeighIn } from "../queries/stored";
import { getPostedWeighIn } from "../queries/weigh-ins";
import { materialOf, missingOfMaterial, refuseTime } from "../rules";
import { weighInDrafts, type WeighedDrafts } from "./drafts";
import { insertWeighIn, type WeighInRow } from "./insert";
import { bagBefore } from "./undo-weigh-in";

/** What stands after a correction: a new record, a second reading, or nothing. */
type Standing = Omit<WeighInRow, "state" | "lotId" | "actId" | "corrects">;

/**
 * Takes a weigh-in back, whatever was done with the bag since, and posts what should have stood there. What the
 * bag or its lot no longer holds is settled as difference; the later uses are named.
 *
 * @throws AppError `not-found`, `corrected-already`, `undone-already`, `not-for-review` for a second reading, and for the
 *   replacement what a weigh-in is refused for
 */
export function correctWeighIn(ctx: Context, input: CorrectWeighInInput): CorrectWeighInReceipt {
  allow(ctx, "weighing.review");
  return once(ctx, `POST /api/weigh-ins/${input.id}/correct`, input.requestId, (tx) => {
    const wrong = requirePosted(tx, input.id);
    const standing = input.replacement && readReplacement(tx, ctx, wrong, input);
    const done = replaceIn(tx, ctx, wrong, standing, input.reason);
    if (standing) {
      insertWeighIn(tx, {
        ...standing,
        state: "posted",
        lotId: done.lot?.lotId ?? null,
        actId: done.actId,
        corrects: wrong.id,
      });
    }
    return receiptOf(tx, ctx, input, wrong, standing, done);
  });
}

/**
 * Lets a second reading stand in the place of the one that counts; where that was taken back since, the second
 * is simply the bag's weighing.
 *
 * @throws AppError `not-found`, `not-for-review`
 */
export function acceptReading(ctx: Context, input: ReviewReadingInput): CorrectWeighInReceipt {
  allow(ctx, "weighing.review");
  const person = requirePerson(ctx);
  return once(ctx, `POST /api/weigh-ins/${input.id}/accept`, input.requestId, (tx) => {
    const second = requireForReview(tx, input.id);
    const first = getPostedWeighIn(tx, second.bagId);
    const wrong = first && requirePosted(tx, first.id);
    const done = wrong ? replaceIn(tx, ctx, wrong, second, input.reason) : postIn(tx, ctx, second);
    prepared(
      tx.client,
      `update weigh_ins set state = 'posted', act_id = ?, lot_id = ?, corrects = ?, reviewed_by = ?, reviewed_at = ?
        where id = ?`,
    ).run(done.actId, done.lot?.lotId ?? null, wrong?.id ?? null, person, ctx.now, second.id);
    if (wrong) return receiptOf(tx, ctx, input, wrong, second, done);
    recordAudit(tx, ctx, {
      action: "weighing.accept",
      subjectKind: "weigh-in",
      subjectId: second.id,
      fields: { bagId: second.bagId, netGrams: second.netGrams },
      personal: { reason: input.reason },
      actId: done.actId,
    });
    const { id, code, netGrams } = second;
    return { id, replacementId: id, code, netGrams, bagState: done.bagState, later: done.later };
  });
}

function requireStored(tx: Tx, id: WeighInId): StoredWeighIn {
  const found = getStoredWeighIn(tx, id);
  if (!found) throw new AppError("not-found");
  return found;
}

function requirePosted(tx: Tx, id: WeighInId): StoredWeighIn & { actId: number } {
  const found = requireStored(tx, id);
  if (found.state === "corrected") throw new AppError("corrected-already");
  if (found.state === "for-review") throw new AppError("not-for-review");
  if (found.state !== "posted" || found.actId === null) throw new AppError("undone-already");
  return { ...found, actId: found.actId };
}

/** A second reading that nobody has decided about. */
export function requireForReview(tx: Tx, id: WeighInId): StoredWeighIn {
  const found = requireStored(tx, id);
  if (found.state !== "for-review") throw new AppError("not-for-review");
  return found;
}

function readReplacement(
  tx: Tx,
  ctx: Context,
  wrong: StoredWeighIn,
  { requestId, replacement }: CorrectWeighInInput,
): Standing {
  if (!replacement) throw new RangeError("no replacement");
  const at = (path: readonly (string | number)[]) => ["replacement", ...path];
  const { occurredAt: claimed } = replacement;
  const scale = requireScale(tx, replacement.scaleId, claimed, at(["scaleId"]));
  const readings = replacement.readings.map(
    (reading, index) => withListedTares(tx, reading, claimed, at(["readings", index])).reading,
  );
  const refusal = refuseReadings(scale, readings) ?? refuseTime(claimed, requireScheme(tx));
  if (refusal) throw new AppError(refusal.code, refusal.detail, at(refusal.path));
  const missing = replacement.oneKind ? missingOfMaterial(replacement) : null;
  if (missing) throw new AppError("one-kind-needs-material", {}, at([missing]));
  if (replacement.colourCode !== null && !getColour(tx, replacement.colourCode)) {
    throw new AppError("unknown-colour", {}, at(["colourCode"]));
  }
  if (!getPoint(tx, replacement.pointId)) throw new AppError("unknown-point", {}, at(["pointId"]));
  const occurredAt = Math.min(claimed, ctx.now) as Instant;
  return {
    ...replacement,
    id: requestId as WeighInId,
    bagId: wrong.bagId,
    doneBy: requirePerson(ctx),
    occurredAt,
    recordedAt: ctx.now,
    readings,
    netGrams: netGramsOf(readings),
    mpeMilligrams: mpeOf(scale, readings),
    belowMinimum: isBelowMinimum(scale, readings),
    basis: basisOf(tx, scale.id, occurredAt),
  };
}

type Done = { actId: number; lot: WeighedDrafts["lot"]; later: LaterUses; bagState: BagState };

/** The act itself, the wrong record's state, and the bag's. */
function replaceIn(
  tx: Tx,
  ctx: Context,
  wrong: StoredWeighIn & { actId: number },
  standing: Standing | null,
  reason: string,
): Done {
  const person = requirePerson(ctx);
  const bag = getBagById(tx, wrong.bagId);
  if (!bag) throw new AppError("not-found");
  const scale = standing && getScale(tx, standing.scaleId);
  if (standing && !scale) throw new AppError("unknown-scale");
  const later = listLaterUses(tx, wrong.actId);
  const posting =
    standing && scale
      ? weighInDrafts(
          tx,
          ctx,
          { ...standing, weighInId: standing.id, code: bag.code, scaleNumber: scale.number },
          standing.oneKind ? materialOf(standing) : null,
          wrong.lotId,
        )
      : { drafts: [], lot: null };
  const { actId } = correctAct(
    tx,
    { now: ctx.now, doneBy: person, sentBy: person, device: null },
    { actId: wrong.actId, subject: `weigh-in:${wrong.id}`, note: reason },
    posting.drafts,
  );
  prepared(
    tx.client,
    "update weigh_ins set state = 'corrected', undone_act_id = ? where id = ?",
  ).run(actId, wrong.id);
  const bagState = settleBag(tx, ctx, bag, wrong, standing);
  return { actId, lot: posting.lot, later, bagState };
}

/** The bag has no weighing that counts: this one is posted as if it were the first. */
function postIn(tx: Tx, ctx: Context, second: StoredWeighIn): Done {
  const person = requirePerson(ctx);
  const scale = getScale(tx, second.scaleId);
  if (!scale) throw new AppError("unknown-scale");
  const { drafts, lot } = weighInDrafts(
    tx,
    ctx,
    { ...second, weighInId: second.id, scaleNumber: scale.number },
    second.oneKind ? materialOf(second) : null,
  );
  const { actId } = postAct(
    tx,
    { now: ctx.now, doneBy: second.doneBy, sentBy: person, device: null },
    drafts,
  );
  moveBagIn(tx, second.bagId, "weighed", ctx.now);
  if (lot) moveBagIn(tx, second.bagId, "sorted", ctx.now);
  return { actId, lot, later: { uses: [], count: 0 }, bagState: lot ? "sorted" : "weighed" };
}

/**
 * A bag that a session has sorted stays sorted: its piles are in their lots. Else it is where its weigh-in leaves it, and
 * without one where it was before it was first weighed.
 */
function settleBag(
  tx: Tx,
  ctx: Context,
  bag: Bag,
  wrong: StoredWeighIn,
  standing: Standing | null,
): BagState {
  const sortedBySession = bag.state !== "weighed" && !wrong.oneKind;
  if (sortedBySession) {
    if (standing)
      restoreBagIn(tx, bag.id, {
        state: bag.state,
        since: bag.stateSince,
        pointId: standing.pointId,
      });
    return bag.state;
  }
  if (!standing) {
    const before = bagBefore(tx, { id: firstOf(tx, wrong.id) });
    restoreBagIn(tx, bag.id, before);
    return before.state;
  }
  const state: BagState = standing.oneKind ? "sorted" : "weighed";
  const since = state === bag.state ? bag.stateSince : ctx.now;
  restoreBagIn(tx, bag.id, { state, since, pointId: standing.pointId });
  return state;
}

/** The first weigh-in of a chain of corrections: its receipt says what the bag was before. */
function firstOf(tx: Tx, id: WeighInId): WeighInId {
  return prepared(
    tx.client,
    `with recursive chain (id, corrects) as (
       select id, corrects from weigh_ins where id = ?
       union all select w.id, w.corrects from weigh_ins w join chain on w.id = chain.corrects)
     select id from chain where corrects is null`,
  )
    .pluck()
    .get(id) as WeighInId;
}

function receiptOf(
  tx: Tx,
  ctx: Context,
  input: { requestId: string; reason: string },
  wrong: StoredWeighIn,
  standing: Standing | null,
  done: Done,
): CorrectWeighInReceipt {
  insertCorrectionIn(tx, ctx, {
    id: input.requestId,
    subjectKind: "weigh-in",
    subjectId: wrong.id,
    replacementId: standing?.id ?? null,
    reason: input.reason,
    doneBy: requirePerson(ctx),
    actId: done.actId,
  });
  recordAudit(tx, ctx, {
    action: "weighing.correct",
    subjectKind: "weigh-in",
    subjectId: wrong.id,
    fields: {
      bagId: wrong.bagId,
      netBefore: wrong.netGrams,
      netGrams: standing?.netGrams ?? null,
      replacement: standing?.id ?? null,
      laterUses: done.later.count,
    },
    actId: done.actId,
  });
  return {
    id: wrong.id,
    replacementId: standing?.id ?? null,
    code: wrong.code,
    netGrams: standing?.netGrams ?? null,
    bagState: done.bagState,
    later: done.later,
  };
}
