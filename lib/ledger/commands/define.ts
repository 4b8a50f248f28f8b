/** Definitions that lines refer to. They are made when they are new and never changed. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import { prepared, type Tx } from "@/lib/platform/database";
import type { HolderKind, OriginType } from "../terms";

/** The holder with a code, made when it is new. */
export function ensureHolder(tx: Tx, kind: HolderKind, code: string): number {
  const found = prepared(tx.client, "select id, kind from holders where code = ?").get(code) as
    { id: number; kind: HolderKind } | undefined;
  if (found) {
    if (found.kind !== kind) throw new AppError("label-in-use", { code });
    return found.id;
  }
  return Number(
    prepared(tx.client, "insert into holders (kind, code) values (?, ?)").run(kind, code)
      .lastInsertRowid,
  );
}

export type MaterialContent = {
  polymer: PolymerAnswer;
  kind: Kind;
  colourCode: string;
  form: Form;
  wash: WashState;
};

/** The material with this content, made (with its row) when it is new. */
export function ensureMaterial(tx: Tx, content: MaterialContent): number {
  const { polymer, kind, colourCode, form, wash } = content;
  const rowId =
    (prepared(tx.client, `select id from "rows" where polymer = ? and kind = ? and colour_code = ?`)
      .pluck()
      .get(polymer, kind, colourCode) as number | undefined) ??
    Number(
      prepared(tx.client, `insert into "rows" (polymer, kind, colour_code) values (?, ?, ?)`).run(
        polymer,
        kind,
        colourCode,
      ).lastInsertRowid,
    );
  return (
    (prepared(tx.client, "select id from materials where row_id = ? and form = ? and wash = ?")
      .pluck()
      .get(rowId, form, wash) as number | undefined) ??
    Number(
      prepared(tx.client, "insert into materials (row_id, form, wash) values (?, ?, ?)").run(
        rowId,
        form,
        wash,
      ).lastInsertRowid,
    )
  );
}

/** The origin of a type, for a drop-off point or none, made when it is new. */
export function ensureOrigin(tx: Tx, type: OriginType, pointId: string | null): number {
  return (
    (prepared(tx.client, "select no from origins where type = ? and point_id is ?")
      .pluck()
      .get(type, pointId) as number | undefined) ??
    Number(
      prepared(tx.client, "insert into origins (type, point_id) values (?, ?)").run(type, pointId)
        .lastInsertRowid,
    )
  );
}
