/** From one lot into another, each as one entry: merging, splitting, identifying. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import { postAct, type Draft } from "@/lib/ledger/commands/post";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { toleranceOf } from "@/lib/scales/rules/loads";
import type {
  IdentifyLotInput,
  MergeLotInput,
  MoveReceipt,
  SplitLotInput,
} from "../contract/moves";
import type { AmountInput, FoundInput } from "../contract/weighed";
import { bookGrams, lotOf, requireLot, type LotRecord } from "../queries/lot-record";
import { requireColourInUse } from "../queries/palette";
import { readWeighed, type Weighed } from "../queries/weighed";
import { doneAt } from "../rules/counting";
import type { IdentifyMethod, MoveKind } from "../terms";
import { closeLotIn } from "./close-lot";
import { lotForMaterialIn, openLotIn } from "./lots";
import { takeFromLotIn } from "./take";

/**
 * Pours a lot, or part of it, into another of the same material. Poured whole it closes.
 *
 * @throws AppError `not-found`, `unknown-lot`, `same-lot`, `lots-differ`, `lot-holds-less`, `lot-empty`, and what a
 *   weighing throws
 */
export function mergeLot(ctx: Context, input: MergeLotInput): MoveReceipt {
  allow(ctx, "stock.move");
  return once<MoveReceipt>(ctx, `POST /api/lots/${input.number}/merge`, input.requestId, (tx) => {
    const from = requireLot(tx, input.number);
    const to = requireMergeable(tx, from, input.toNumber);
    return moveIn(tx, ctx, {
      ...input,
      kind: "merge",
      from,
      to: { lot: to, opened: false },
      method: null,
      left: input.count,
    });
  });
}

/** @throws AppError `unknown-lot`, `same-lot`, `lots-differ` */
export function requireMergeable(tx: Tx, from: LotRecord, toNumber: number): LotRecord {
  const to = requireLot(tx, toNumber, ["toNumber"]);
  if (to.lotId === from.lotId) throw new AppError("same-lot", { number: to.number }, ["toNumber"]);
  if (to.materialId !== from.materialId) {
    throw new AppError("lots-differ", { from: from.number, to: to.number }, ["toNumber"]);
  }
  return to;
}

/**
 * Puts part of a lot into a container of its own: a new lot of the same material.
 *
 * @throws AppError `not-found`, `lot-holds-less`, and what a weighing throws
 */
export function splitLot(ctx: Context, input: SplitLotInput): MoveReceipt {
  allow(ctx, "stock.move");
  return once<MoveReceipt>(ctx, `POST /api/lots/${input.number}/split`, input.requestId, (tx) => {
    const from = requireLot(tx, input.number);
    const { lotId, opened } = openLotIn(tx, ctx, from.materialId, input.place);
    return moveIn(tx, ctx, {
      ...input,
      kind: "split",
      from,
      to: { lot: lotOf(tx, lotId), opened },
      amount: { how: "taken", ...input.amount, all: false },
      method: null,
      left: input.count,
    });
  });
}

/**
 * Moves "Not sure" stock to the lot of what it turned out to be; form and wash state stay.
 *
 * @throws AppError `not-found`, `lot-identified-already`, `unknown-colour`, `lot-holds-less`, `lot-empty`, and what a
 *   weighing throws
 */
export function identifyLot(ctx: Context, input: IdentifyLotInput): MoveReceipt {
  allow(ctx, "stock.identify");
  return once<MoveReceipt>(
    ctx,
    `POST /api/lots/${input.number}/identify`,
    input.requestId,
    (tx) => {
      const from = requireLot(tx, input.number);
      if (from.polymer !== "not-sure") {
        throw new AppError("lot-identified-already", { number: from.number });
      }
      // The lot's own colour stays possible when it has left the palette since.
      if (input.colourCode !== from.colourCode) {
        requireColourInUse(tx, input.colourCode, ["colourCode"]);
      }
      const { polymer, kind, colourCode } = input;
      const { form, wash } = from;
      const materialId = ensureMaterial(tx, { polymer, kind, colourCode, form, wash });
      const { lotId, opened } = lotForMaterialIn(tx, ctx, materialId);
      return moveIn(tx, ctx, {
        ...input,
        kind: "identify",
        from,
        to: { lot: lotOf(tx, lotId), opened },
        left: input.count,
      });
    },
  );
}

type Move = {
  requestId: string;
  kind: MoveKind;
  from: LotRecord;
  to: { lot: LotRecord; opened: boolean };
  amount: AmountInput;
  method: IdentifyMethod | null;
  left: FoundInput | null;
  reservedToo?: boolean | undefined;
  occurredAt: Instant;
};

function moveIn(tx: Tx, ctx: Context, move: Move): MoveReceipt {
  const { from, kind, amount } = move;
  const to = move.to.lot;
  const doneBy = requirePerson(ctx);
  const moveId = move.requestId as Id<"lot-move">;
  const occurredAt = doneAt(move.occurredAt, from.openedAt, ctx.now);
  const weighed = amount.how === "all" ? null : readWeighed(tx, amount, occurredAt, ["amount"]);
  const all = amount.how === "all" || amount.all;
  const taken = takeFromLotIn(tx, ctx, {
    lot: from,
    grams: weighed?.netGrams ?? null,
    toleranceMilligrams: weighed ? toleranceOf(weighed.loads) : 0,
    all,
    weighed,
    left: move.left,
    reservedToo: move.reservedToo ?? false,
    occurredAt,
    path: [],
  });
  const { actId } = postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, [
    moveDraft({ moveId, kind, to, occurredAt, weighed }, taken),
  ]);
  const closed = all && closeLotIn(tx, from.lotId, ctx.now, kind === "merge" ? "merged" : "empty");
  insertMoveIn(tx, ctx, {
    moveId,
    kind,
    from,
    to,
    grams: taken.grams,
    method: move.method,
    scaleId: weighed?.scaleId ?? null,
    occurredAt,
    actId,
    corrects: null,
  });
  recordAudit(tx, ctx, {
    action: `stock.${kind}`,
    subjectKind: "lot-move",
    subjectId: moveId,
    fields: {
      fromLotId: from.lotId,
      toLotId: to.lotId,
      grams: taken.grams,
      differenceGrams: taken.differenceGrams,
      opened: move.to.opened,
      countId: taken.countId,
      method: move.method,
    },
    actId,
  });
  return {
    moveId,
    kind,
    grams: taken.grams,
    differenceGrams: taken.differenceGrams,
    from: { number: from.number, heldGrams: bookGrams(tx, from), closed },
    to: { number: to.number, heldGrams: bookGrams(tx, to), opened: move.to.opened },
    recordedAt: ctx.now,
    undoUntil: undoUntil(ctx.now),
  };
}

/** The draft of a move: what leaves one lot arrives in the other, and a difference beside it. */
export function moveDraft(
  move: {
    moveId: Id<"lot-move">;
    kind: MoveKind;
    to: LotRecord;
    occurredAt: Instant;
    weighed: Weighed | null;
  },
  taken: { grams: number; lines: Draft["lines"]; differenceGrams: number },
): Draft {
  const { to, weighed } = move;
  return {
    kind: move.kind === "identify" ? "identify" : "move",
    occurredAt: move.occurredAt,
    subject: `lot-move:${move.moveId}`,
    lines: [
      ...taken.lines,
      {
        account: "lot",
        holderId: to.holderId,
        materialId: to.materialId,
        grams: taken.grams,
        ...(weighed
          ? {
              basis: weighed.basis,
              scaleNumber: weighed.scaleNumber,
              mpeMilligrams: weighed.mpeMilligrams,
            }
          : {}),
      },
      ...(taken.differenceGrams === 0
        ? []
        : [{ account: "difference" as const, grams: taken.differenceGrams }]),
    ],
  };
}

/** The row of a move, with the act that it made. */
export function insertMoveIn(
  tx: Tx,
  ctx: Context,
  move: {
    moveId: Id<"lot-move">;
    kind: MoveKind;
    from: LotRecord;
    to: LotRecord;
    grams: number;
    method: IdentifyMethod | null;
    scaleId: string | null;
    occurredAt: Instant;
    actId: number;
    corrects: Id<"lot-move"> | null;
  },
): void {
  prepared(
    tx.client,
    `insert into lot_moves (id, kind, from_lot_id, to_lot_id, grams, method, scale_id, act_id, corrects, done_by,
       occurred_at, recorded_at, state) values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, 'posted')`,
  ).run(
    move.moveId,
    move.kind,
    move.from.lotId,
    move.to.lotId,
    move.grams,
    move.method,
    move.scaleId,
    move.actId,
    move.corrects,
    requirePerson(ctx),
    move.occurredAt,
    ctx.now,
  );
}
