/** A scheme's stock: a fine scale, crates, and lots that were filled from points as sorting fills them. */
import { newId, type Id, type ScaleId } from "@/lib/core/ids";
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { UNSORTED } from "@/lib/ledger/terms";
import { inTransaction } from "@/lib/platform/database";
import { lotForMaterialIn } from "@/lib/stock/commands/lots";
import { setUpPaletteIn } from "@/lib/stock/commands/palette";
import { getLotRecord, lastSeen, bookGrams } from "@/lib/stock/queries/lot-record";
import { NOON, type TestScheme } from "./scheme";

export type Material = {
  polymer?: PolymerAnswer;
  kind?: Kind;
  colour?: string;
  form?: Form;
  wash?: WashState;
};

/** Class III, Max 6 kg, e = d = 1 g: in service ± 1 g up to 500 g, ± 2 g up to 2 kg, ± 3 g beyond. */
export type StockRoom = TestScheme & {
  scaleId: ScaleId;
  /** A crate of 150 g. */
  crateId: Id<"container">;
  tubId: Id<"container">;
  /** Puts grams of a point's plastic into the open lot of a material and gives its number. */
  fill: (grams: number, material?: Material, point?: number, at?: Instant) => number;
  held: (number: number) => number;
  seen: (number: number) => { entryId: number; countId: string | null };
  /** So many grams on the pan of the fine scale. */
  weighed: (...grams: number[]) => { scaleId: ScaleId; readings: ReadingInput[] };
};

/** Adds a stock room to a scheme; safe to call once a scheme. */
export function stockRoom(scheme: TestScheme): StockRoom {
  const { client } = scheme.db.writer;
  const scaleId = newId<"scale">(NOON);
  const [crateId, tubId] = [newId<"container">(NOON), newId<"container">(NOON)];
  const points = ["Town library", "Quay café", "Marsh school"].map((name) => {
    const id = newId<"point">(NOON);
    client
      .prepare("insert into points (id, name, kind, created_at) values (?, ?, 'other', ?)")
      .run(id, name, NOON);
    return id;
  });
  inTransaction(scheme, (tx) => {
    setUpPaletteIn(tx);
    if (tx.client.prepare("select count(*) from sites").pluck().get() === 0) {
      tx.client.prepare("insert into sites (id, name) values (1, 'Shed')").run();
    }
    tx.client
      .prepare(
        `insert into scales (id, number, name, site_id, class, max_mg, e_mg, d_mg, created_at)
         values (?, 7, 'Fine scale', 1, 'III', 6000000, 1000, 1000, 0)`,
      )
      .run(scaleId);
    for (const [id, name] of [
      [crateId, "Grey crate"],
      [tubId, "Blue tub"],
    ] as const) {
      tx.client
        .prepare(
          "insert into containers (id, kind, name, tare_mg, created_at) values (?, 'container', ?, 150000, 0)",
        )
        .run(id, name);
      tx.client
        .prepare(
          "insert into container_tares (container_id, valid_from, tare_mg) values (?, 0, 150000)",
        )
        .run(id);
    }
  });
  const record = (number: number) => {
    const lot = getLotRecord(scheme.db.reader, number);
    if (!lot) throw new Error(`no lot ${number}`);
    return lot;
  };
  return {
    ...scheme,
    scaleId,
    crateId,
    tubId,
    fill: (grams, material = {}, point = 0, at = NOON) =>
      inTransaction(scheme, (tx) => {
        const materialId = ensureMaterial(tx, {
          polymer: material.polymer ?? "PE-HD",
          kind: material.kind ?? "lids",
          colourCode: material.colour ?? "blue",
          form: material.form ?? "whole",
          wash: material.wash ?? "as-received",
        });
        const lot = lotForMaterialIn(tx, scheme.ctx("volunteer", at), materialId);
        const bag = ensureHolder(tx, "bag", newId(at));
        const originNo = ensureOrigin(tx, "donated", points[point] ?? null);
        const meta = { now: at, doneBy: scheme.people.volunteer, sentBy: "x", device: null };
        const subject = `sorting:${newId(at)}`;
        postAct(tx, meta, [
          {
            kind: "weigh-in",
            occurredAt: at,
            subject,
            lines: [
              { account: "source", originNo, materialId: UNSORTED, grams: -grams },
              { account: "bag", holderId: bag, materialId: UNSORTED, grams },
            ],
          },
          {
            kind: "sort",
            occurredAt: at,
            subject,
            lines: [
              { account: "bag", holderId: bag, materialId: UNSORTED, grams: -grams },
              { account: "lot", holderId: lot.holderId, materialId, grams },
            ],
          },
        ]);
        return lot.number;
      }),
    held: (number) => bookGrams(scheme.db.reader, record(number)),
    seen: (number) => lastSeen(scheme.db.reader, record(number)),
    weighed: (...grams) => ({ scaleId, readings: grams.map(onFineScale) }),
  };
}

/** A reading of so many grams without container and sack. */
export function onFineScale(grams: number): ReadingInput {
  return {
    grossMilligrams: grams * 1000,
    containerId: null,
    containerTareMilligrams: 0,
    sackId: null,
    sackTareMilligrams: 0,
  };
}
