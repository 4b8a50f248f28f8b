/** What the numbers in lines stand for: rows of materials, types of origins, codes of all of them. */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import { materialCode } from "../rules/canonical";
import type { OriginType } from "../terms";

/** The definitions that lines name by number, remembered for as long as the object is used. */
export type Definitions = {
  rowOf: (materialId: number) => number;
  originType: (originNo: number) => OriginType;
  holderCode: (holderId: number) => string;
  materialCode: (materialId: number) => string;
  originCode: (originNo: number) => string;
};

function remembered<T>(read: (id: number) => T): (id: number) => T {
  const known = new Map<number, T>();
  return (id) => {
    const found = known.get(id);
    if (found !== undefined) return found;
    const value = read(id);
    known.set(id, value);
    return value;
  };
}

/** Not to be kept longer than a transaction: a rolled-back definition must not be remembered. */
export function definitions(db: Readable): Definitions {
  const material = remembered((id) => {
    const found = prepared(
      db.client,
      `select m.id, m.row_id as rowId, r.polymer, r.kind, r.colour_code as colourCode, m.form, m.wash
       from materials m join "rows" r on r.id = m.row_id where m.id = ?`,
    ).get(id) as (Parameters<typeof materialCode>[0] & { rowId: number }) | undefined;
    if (!found) throw new RangeError(`no material ${id}`);
    return found;
  });
  const origin = remembered((no) => {
    const found = prepared(
      db.client,
      "select type, point_id as pointId from origins where no = ?",
    ).get(no) as { type: OriginType; pointId: string | null } | undefined;
    if (!found) throw new RangeError(`no origin ${no}`);
    return found;
  });
  const holder = remembered((id) => {
    const found = prepared(db.client, "select kind, code from holders where id = ?").get(id) as
      { kind: string; code: string } | undefined;
    if (!found) throw new RangeError(`no holder ${id}`);
    return `${id}:${found.kind}:${found.code}`;
  });
  return {
    rowOf: (id) => material(id).rowId,
    originType: (no) => origin(no).type,
    holderCode: holder,
    materialCode: (id) => materialCode(material(id)),
    originCode: (no) => `${no}:${origin(no).type}:${origin(no).pointId ?? ""}`,
  };
}
