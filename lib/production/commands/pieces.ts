/** Writes of the catalogue's pieces. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addPieceEndpoint,
  changePieceEndpoint,
  Piece,
  PieceData,
  weighPiecesEndpoint,
} from "../contract/catalogue";
import { getPiece, readPieces } from "../queries/catalogue";

type PieceId = Id<"piece">;

/** @throws AppError `name-in-use` */
export function addPiece(ctx: Context, input: z.output<typeof addPieceEndpoint.input>): Piece {
  allow(ctx, "production.catalogue");
  return once<Piece>(ctx, "POST /api/pieces", input.requestId, (tx) => {
    const id = input.requestId as PieceId;
    requireFreeName(readPieces(tx), input.name, null);
    const columns = columnsOf(input);
    prepared(
      tx.client,
      `insert into pieces (id, created_at, ${Object.keys(columns).join(", ")})
       values (@id, @now, ${Object.keys(columns)
         .map((name) => `@${name}`)
         .join(", ")})`,
    ).run({ id, now: ctx.now, ...columns });
    insertChoices(tx, id, input);
    recordPieceAudit(tx, ctx, "pieces.add", id, input);
    return requirePiece(tx, id);
  });
}

/** @throws AppError `not-found`, `name-in-use` */
export function changePiece(
  ctx: Context,
  input: z.output<typeof changePieceEndpoint.input>,
): Piece {
  allow(ctx, "production.catalogue");
  return once<Piece>(ctx, `PUT /api/pieces/${input.pieceId}`, input.requestId, (tx) => {
    const before = requirePiece(tx, input.pieceId);
    requireFreeName(readPieces(tx), input.name, before.id);
    const columns = columnsOf(input);
    // What was weighed was another piece when method, size or mass change.
    const resized =
      before.method !== input.method ||
      (["lengthUm", "widthUm", "thicknessUm", "volumeMm3", "massMilligrams"] as const).some(
        (field) => before[field] !== input[field],
      );
    prepared(
      tx.client,
      `update pieces set ${Object.keys(columns)
        .map((name) => `${name} = @${name}`)
        .join(
          ", ",
        )}${resized ? ", weighed_mg = null, weighed_pieces = null, weighed_at = null" : ""}
        where id = @id`,
    ).run({ id: before.id, ...columns });
    for (const table of ["piece_polymers", "piece_kinds"]) {
      prepared(tx.client, `delete from ${table} where piece_id = ?`).run(before.id);
    }
    insertChoices(tx, before.id, input);
    recordPieceAudit(tx, ctx, "pieces.change", before.id, input);
    return requirePiece(tx, before.id);
  });
}

/**
 * Good pieces weighed together; their mean, to the milligram, replaces the computed mass in every later plan.
 *
 * @throws AppError `not-found`
 */
export function weighPieces(
  ctx: Context,
  input: z.output<typeof weighPiecesEndpoint.input>,
): Piece {
  allow(ctx, "production.catalogue");
  return once<Piece>(ctx, `POST /api/pieces/${input.pieceId}/mass`, input.requestId, (tx) => {
    const { id } = requirePiece(tx, input.pieceId);
    const { count, milligrams } = input;
    prepared(
      tx.client,
      "update pieces set weighed_mg = ?, weighed_pieces = ?, weighed_at = ? where id = ?",
    ).run(Math.round(milligrams / count), count, ctx.now, id);
    recordAudit(tx, ctx, {
      action: "pieces.weigh",
      subjectKind: "piece",
      subjectId: id,
      fields: { count, milligrams },
    });
    return requirePiece(tx, id);
  });
}

/** A field that the method has no use for is not kept. */
function columnsOf(data: PieceData) {
  const sheet = data.method !== "moulding";
  const pressing = data.method === "pressing";
  return {
    name: tidyName(data.name),
    method: data.method,
    length_um: sheet ? data.lengthUm : null,
    width_um: sheet ? data.widthUm : null,
    thickness_um: sheet ? data.thicknessUm : null,
    trim_thousandths: pressing ? (data.trimThousandths ?? 0) : null,
    pieces_per_sheet: data.method === "cutting" ? data.piecesPerSheet : null,
    volume_mm3: pressing ? null : data.volumeMm3,
    mass_mg: pressing ? null : data.massMilligrams,
    price_cents: data.priceCents,
    other_cost_cents: data.otherCostCents,
    most_heated_thousandths: data.mostHeatedThousandths,
  };
}

function insertChoices(tx: Tx, id: PieceId, { polymers, kinds }: PieceData): void {
  const polymer = prepared(
    tx.client,
    "insert into piece_polymers (piece_id, polymer) values (?, ?)",
  );
  for (const one of new Set(polymers)) polymer.run(id, one);
  const kind = prepared(tx.client, "insert into piece_kinds (piece_id, kind) values (?, ?)");
  for (const one of new Set(kinds)) kind.run(id, one);
}

function recordPieceAudit(
  tx: Tx,
  ctx: Context,
  action: "pieces.add" | "pieces.change",
  id: PieceId,
  data: PieceData,
): void {
  const { name, method, priceCents, otherCostCents } = data;
  recordAudit(tx, ctx, {
    action,
    subjectKind: "piece",
    subjectId: id,
    fields: {
      name,
      method,
      polymers: data.polymers.join(", "),
      kinds: data.kinds.join(", "),
      priceCents,
      otherCostCents,
    },
  });
}

function requirePiece(tx: Tx, id: PieceId): Piece {
  const piece = getPiece(tx, id);
  if (!piece) throw new AppError("not-found");
  return piece;
}
