/** A scheme with points, a palette, a scale, tares and reject reasons, and bags that were weighed in. */
import { randomInt } from "node:crypto";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import type { LabelCode } from "@/lib/core/bag-code";
import { newId, type BagId, type Id, type PointId, type ScaleId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { ensureHolder, ensureOrigin } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { UNSORTED } from "@/lib/ledger/terms";
import { inTransaction, type Tx } from "@/lib/platform/database";
import { setUpSortingIn } from "@/lib/sorting/commands/set-up";
import type { CloseSortingInput } from "@/lib/sorting/contract/sortings";
import { setUpPaletteIn } from "@/lib/stock/commands/palette";
import type { ReadingInput } from "@/lib/core/schemas";
import { newScheme, NOON, type TestScheme } from "./scheme";

/** Class III, Max 30 kg, e = d = 5 g: in service ± 5 g up to 2.5 kg, ± 10 g up to 10 kg, ± 15 g beyond. */
export const SCALE = {
  class: "III" as const,
  maxMilligrams: 30_000_000,
  eMilligrams: 5_000,
  dMilligrams: 5_000,
  statedAccuracyMilligrams: null,
};

export type WeighedIn = { bagId: BagId; code: LabelCode; netGrams: number };

export type Shed = TestScheme & {
  scaleId: ScaleId;
  /** A crate of 150 g. */
  crateId: Id<"container">;
  points: PointId[];
  /** Weighs a bag in without a container: gross is net. Posted as the weigh-in command posts it. */
  weigh: (netGrams: number, options?: { at?: Instant; point?: number }) => WeighedIn;
};

/** Opens a fresh shed; close it at the end of the test. */
export function newShed(): Shed {
  const scheme = newScheme();
  const scaleId = newId<"scale">(NOON);
  const crateId = newId<"container">(NOON);
  const points = ["Town library", "Quay café", "Marsh school"].map((name) => {
    const id = newId<"point">(NOON);
    scheme.db.writer.client
      .prepare("insert into points (id, name, kind, created_at) values (?, ?, 'other', ?)")
      .run(id, name, NOON);
    return id;
  });
  inTransaction(scheme, (tx) => {
    setUpPaletteIn(tx);
    setUpSortingIn(tx);
    if (tx.client.prepare("select count(*) from sites").pluck().get() === 0) {
      tx.client.prepare("insert into sites (id, name) values (1, 'Shed')").run();
    }
    tx.client
      .prepare(
        `insert into scales (id, number, name, site_id, class, max_mg, e_mg, d_mg, created_at)
         values (?, 1, 'Bench scale', 1, 'III', ?, ?, ?, ?)`,
      )
      .run(scaleId, SCALE.maxMilligrams, SCALE.eMilligrams, SCALE.dMilligrams, NOON);
    tx.client
      .prepare(
        "insert into containers (id, kind, name, tare_mg, created_at) values (?, 'container', 'Grey crate', 150000, ?)",
      )
      .run(crateId, NOON);
    tx.client
      .prepare(
        "insert into container_tares (container_id, valid_from, tare_mg) values (?, ?, 150000)",
      )
      .run(crateId, NOON);
  });
  const weigh: Shed["weigh"] = (netGrams, { at = NOON, point = 0 } = {}) =>
    inTransaction(scheme, (tx) => {
      const pointId = points[point];
      if (!pointId) throw new RangeError("no such point");
      return weighIn(tx, { netGrams, at, pointId, scaleId, personId: scheme.people.volunteer });
    });
  return { ...scheme, scaleId, crateId, points, weigh };
}

function weighIn(
  tx: Tx,
  of: { netGrams: number; at: Instant; pointId: PointId; scaleId: ScaleId; personId: string },
): WeighedIn {
  const bagId = newId<"bag">(of.at);
  const code = makeLabelIn(tx, "bag", bagId, of.at, (below) => randomInt(below));
  const weighInId = newId<"weigh-in">(of.at);
  tx.client
    .prepare(
      "insert into bags (id, code, point_id, state, state_since, printed_at) values (?, ?, ?, 'weighed', ?, ?)",
    )
    .run(bagId, code, of.pointId, of.at, of.at);
  const holderId = ensureHolder(tx, "bag", code);
  const originNo = ensureOrigin(tx, "donated", of.pointId);
  const { actId } = postAct(
    tx,
    { now: of.at, doneBy: of.personId, sentBy: of.personId, device: null },
    [
      {
        kind: "weigh-in",
        occurredAt: of.at,
        subject: `weigh-in:${weighInId}`,
        lines: [
          {
            account: "source",
            originNo,
            materialId: UNSORTED,
            grams: -of.netGrams,
            basis: "unchecked",
            scaleNumber: 1,
            mpeMilligrams: 10_000,
          },
          { account: "bag", holderId, materialId: UNSORTED, grams: of.netGrams },
        ],
      },
    ],
  );
  tx.client
    .prepare(
      `insert into weigh_ins (id, bag_id, point_id, scale_id, done_by, occurred_at, recorded_at, state, net_grams,
         mpe_mg, basis, below_minimum, condition, polymer, one_kind, act_id)
       values (?, ?, ?, ?, ?, ?, ?, 'posted', ?, 10000, 'unchecked', 0, 'clean', 'mixed', 0, ?)`,
    )
    .run(weighInId, bagId, of.pointId, of.scaleId, of.personId, of.at, of.at, of.netGrams, actId);
  tx.client
    .prepare(
      `insert into weigh_in_readings (weigh_in_id, seq, gross_mg, container_tare_mg, sack_tare_mg)
       values (?, 1, ?, 0, 0)`,
    )
    .run(weighInId, of.netGrams * 1000);
  return { bagId, code, netGrams: of.netGrams };
}

/** A reading of so many grams on the pan, without container and sack. */
export function onPan(netGrams: number): ReadingInput {
  return {
    grossMilligrams: netGrams * 1000,
    containerId: null,
    containerTareMilligrams: 0,
    sackId: null,
    sackTareMilligrams: 0,
  };
}

type PileOf = {
  colour?: string;
  polymer?: CloseSortingInput["piles"][number]["polymer"];
  lot?: CloseSortingInput["piles"][number]["lot"];
  grams: number;
};

/** A sorting of one bag or several as a client sends it. */
export function sorting(
  shed: Shed,
  bag: WeighedIn | readonly WeighedIn[],
  of: {
    piles?: readonly PileOf[];
    rejects?: readonly { reason?: string; grams: number }[];
    at?: Instant;
    cause?: CloseSortingInput["cause"];
    confirmedAbove?: boolean;
  },
): CloseSortingInput {
  return {
    requestId: newId(of.at ?? NOON),
    codes: ("code" in bag ? [bag] : bag).map(({ code }) => code),
    scaleId: shed.scaleId,
    occurredAt: of.at ?? NOON,
    piles: (of.piles ?? []).map((pile) => ({
      polymer: pile.polymer ?? "PE-HD",
      colourCode: pile.colour ?? "blue",
      kind: "lids" as const,
      form: "whole" as const,
      wash: "as-received" as const,
      lot: pile.lot ?? null,
      reading: onPan(pile.grams),
    })),
    rejects: (of.rejects ?? []).map((reject) => ({
      reason: reject.reason ?? "stuck",
      reading: onPan(reject.grams),
    })),
    cause: of.cause ?? null,
    confirmedAbove: of.confirmedAbove ?? false,
  };
}

/** Noon of a day in May 2026 or any other. */
export function noonOf(day: string): Instant {
  return instant(Date.parse(`${day}T12:00:00Z`));
}
