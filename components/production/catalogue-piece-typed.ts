import type * as z from "zod";
import { formatMeasure } from "@/lib/core/measure";
import type { Kind } from "@/lib/core/plastics";
import type { Piece, pieceDataSchema } from "@/lib/production/contract/catalogue";
import type { Heatable, Method } from "@/lib/production/terms";

/** A piece as its dialog holds it: text as typed, also of fields that the chosen method does not show. */
export type PieceTyped = {
  name: string;
  method: Method;
  /** How the mass of one is known; the other field's text waits. */
  by: "mass" | "volume";
  polymers: Heatable[];
  kinds: Kind[];
  lengthUm: string;
  widthUm: string;
  thicknessUm: string;
  trimThousandths: string;
  piecesPerSheet: string;
  volumeMm3: string;
  massMilligrams: string;
  priceCents: string;
  otherCostCents: string;
  mostHeatedThousandths: string;
};

const NEW_PIECE: PieceTyped = {
  name: "",
  method: "moulding",
  by: "mass",
  polymers: [],
  kinds: [],
  lengthUm: "",
  widthUm: "",
  thicknessUm: "",
  trimThousandths: "5",
  piecesPerSheet: "",
  volumeMm3: "",
  massMilligrams: "",
  priceCents: "",
  otherCostCents: "0.00",
  mostHeatedThousandths: "",
};

/** What the dialog starts with; null: a new piece. */
export function typedPiece(piece: Piece | null): PieceTyped {
  if (!piece) return NEW_PIECE;
  const { name, method, polymers, kinds } = piece;
  return {
    name,
    method,
    polymers,
    kinds,
    by: piece.volumeMm3 === null ? "mass" : "volume",
    lengthUm: formatMeasure(piece.lengthUm, "length"),
    widthUm: formatMeasure(piece.widthUm, "length"),
    thicknessUm: formatMeasure(piece.thicknessUm, "length"),
    trimThousandths: formatMeasure(piece.trimThousandths, "share"),
    piecesPerSheet: piece.piecesPerSheet === null ? "" : String(piece.piecesPerSheet),
    volumeMm3: formatMeasure(piece.volumeMm3, "volume"),
    massMilligrams: formatMeasure(piece.massMilligrams, "mass"),
    priceCents: formatMeasure(piece.priceCents, "money"),
    otherCostCents: formatMeasure(piece.otherCostCents, "money"),
    mostHeatedThousandths: formatMeasure(piece.mostHeatedThousandths, "share"),
  };
}

/** What the chosen method asks for; the text of other fields is not sent and not judged. */
export function askedPiece({ by, ...typed }: PieceTyped): z.input<typeof pieceDataSchema> {
  const { method } = typed;
  const sheet = method !== "moulding";
  const only = (shown: boolean, text: string): string => (shown ? text : "");
  return {
    ...typed,
    lengthUm: only(sheet, typed.lengthUm),
    widthUm: only(sheet, typed.widthUm),
    thicknessUm: only(sheet, typed.thicknessUm),
    trimThousandths: only(method === "pressing", typed.trimThousandths),
    piecesPerSheet: only(method === "cutting", typed.piecesPerSheet),
    volumeMm3: only(method !== "pressing" && by === "volume", typed.volumeMm3),
    massMilligrams: only(method !== "pressing" && by === "mass", typed.massMilligrams),
  };
}
