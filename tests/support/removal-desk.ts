/** A scheme with rejects in the bin, two lots, a scale and two destinations: what a removal needs. */
import { newId, type Id } from "@/lib/core/ids";
import { dayOf, type Day, type Instant } from "@/lib/core/time";
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { inTransaction } from "@/lib/platform/database";
import { addDestination, retireDestination } from "@/lib/removals/commands/destinations";
import { enterReceipt } from "@/lib/removals/commands/receipts";
import { takeAway, undoRemoval } from "@/lib/removals/commands/take-away";
import { wasteCodeSchema } from "@/lib/removals/contract/destinations";
import { takeAwayEndpoint, type TakeAwayInput } from "@/lib/removals/contract/removals";
import type { Route } from "@/lib/removals/terms";
import { addScale } from "@/lib/scales/commands/scales";
import { lotForMaterialIn } from "@/lib/stock/commands/lots";
import { NOON, type TestScheme } from "./scheme";
import { onPan } from "./shed";

/** Lots are numbered 1 (blue HDPE, 3.000 kg) and 2 (red PP, 1.000 kg); the bin holds 2.000 kg. All since NOON. */
export function removalDesk(scheme: TestScheme) {
  const ctx = scheme.ctx("coordinator");
  const scale = addScale(ctx, {
    requestId: newId(NOON),
    name: "Floor scale",
    class: "III",
    maxMilligrams: 30_000_000,
    eMilligrams: 5_000,
    dMilligrams: 5_000,
  });
  const destination = (name: string, route: Route) =>
    addDestination(ctx, {
      requestId: newId(NOON),
      name,
      route,
      receiverNumber: "REG/1042",
      carrierName: "Estuary Carriers",
      carrierNumber: "CB/77",
      permitUntil: null,
      wasteCode: wasteCodeSchema.parse("191204"),
    }).id;
  const tip = destination("Marsh Transfer Station", "disposed");
  const recycler = destination("Quay Recycling", "passed-on");

  const { lots, binId } = inTransaction(scheme, (tx) => {
    const lotsMade = (
      [
        ["PE-HD", "blue"],
        ["PP", "red"],
      ] as const
    ).map(([polymer, colourCode]) => {
      const materialId = ensureMaterial(tx, {
        polymer,
        kind: "lids",
        colourCode,
        form: "whole",
        wash: "as-received",
      });
      return { materialId, ...lotForMaterialIn(tx, ctx, materialId) };
    });
    return { lots: lotsMade, binId: ensureHolder(tx, "reject-bin", "REJECT-BIN-1") };
  });
  const lotOf = (number: number) => {
    const lot = lots[number - 1];
    if (!lot) throw new RangeError(`lot ${number}`);
    return lot;
  };

  /** A bag is weighed in and sorted: so much into lot 1, into lot 2, and into the bin. */
  const fill = (blue: number, red: number, rejects: number, at: Instant = NOON): void =>
    inTransaction(scheme, (tx) => {
      const grams = blue + red + rejects;
      const bagId = ensureHolder(tx, "bag", `BAG-${newId(at)}`);
      postAct(tx, { now: at, doneBy: "x", sentBy: "x", device: null }, [
        {
          kind: "weigh-in",
          occurredAt: at,
          subject: "test:weigh-in",
          lines: [
            {
              account: "source",
              originNo: ensureOrigin(tx, "donated", null),
              materialId: UNSORTED,
              grams: -grams,
              basis: "checked",
              scaleNumber: 1,
              mpeMilligrams: 10_000,
            },
            { account: "bag", holderId: bagId, materialId: UNSORTED, grams },
          ],
        },
        {
          kind: "sort",
          occurredAt: at,
          subject: "test:sort",
          lines: [
            { account: "bag" as const, holderId: bagId, materialId: UNSORTED, grams: -grams },
            { account: "lot" as const, ...placeOf(1), grams: blue },
            { account: "lot" as const, ...placeOf(2), grams: red },
            {
              account: "reject-bin" as const,
              holderId: binId,
              materialId: REJECT,
              grams: rejects,
            },
          ].filter((line) => line.grams !== 0),
        },
      ]);
    });
  const placeOf = (number: number) => {
    const { holderId, materialId } = lotOf(number);
    return { holderId, materialId };
  };
  fill(3000, 1000, 2000);

  const held = (of: number | "bin"): number =>
    of === "bin"
      ? heldBy(scheme.db.writer, binId, REJECT)
      : heldBy(scheme.db.writer, lotOf(of).holderId, lotOf(of).materialId);

  type Of = {
    grams: number;
    whole?: boolean;
    /** Lot number; the reject bin without. */
    lot?: number;
    route?: Route;
    how?: "weighed" | "stated" | "book";
    day?: string;
    confirmedAbove?: boolean;
  };
  /** What a client sends, through the contract. */
  const input = ({ grams, whole = false, lot, how = "weighed", ...of }: Of): TakeAwayInput => {
    const lotNumber = lot ?? null;
    const loads = {
      weighed: { scaleId: scale.id, loads: [{ lotNumber, whole, readings: [onPan(grams)] }] },
      stated: { loads: [{ lotNumber, whole, grams }] },
      book: { loads: [{ lotNumber }] },
    }[how];
    return takeAwayEndpoint.input.parse({
      requestId: newId(NOON),
      destinationId: of.route === "disposed" ? tip : recycler,
      day: of.day ?? dayOf(NOON, "UTC"),
      noteNumber: "TN 118",
      taking: { how, ...loads },
      confirmedAbove: of.confirmedAbove ?? false,
    });
  };
  const takeSent = (sent: TakeAwayInput, now: Instant = NOON) =>
    takeAway(scheme.ctx("lead", now, sent), sent);
  const take = (of: Of, now: Instant = NOON) => takeSent(input(of), now);
  const undo = (id: Id<"removal">) => {
    const sent = { requestId: newId(NOON), id };
    return undoRemoval(scheme.ctx("lead", NOON, sent), sent);
  };
  const retire = (destinationId: Id<"destination">) => {
    const sent = { requestId: newId(NOON), destinationId };
    return retireDestination(scheme.ctx("coordinator", NOON, sent), sent);
  };
  const prove = (
    id: Id<"removal">,
    number: string,
    day: string,
    now: Instant,
    receivedGrams = 1980,
  ) => {
    const sent = { requestId: newId(now), id, number, day: day as Day, receivedGrams };
    return enterReceipt(scheme.ctx("lead", now, sent), sent);
  };
  return {
    ...scheme,
    scale,
    tip,
    recycler,
    lots,
    fill,
    held,
    input,
    take,
    takeSent,
    prove,
    undo,
    retire,
  };
}

export type RemovalDesk = ReturnType<typeof removalDesk>;

/** An entry's lines outside holders, as [account, cause, grams], over the whole ledger. */
export function outsideLines(scheme: TestScheme): [string, string | null, number][] {
  return scheme.db.reader.client
    .prepare(
      `select account, cause, grams from lines
        where account in ('disposed', 'passed-on', 'difference') order by entry_id, seq`,
    )
    .raw()
    .all() as [string, string | null, number][];
}
