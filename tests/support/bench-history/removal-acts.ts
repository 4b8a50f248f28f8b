/** Loads that leave the shed in a random history, and their receipts. */
import { type Id } from "@/lib/core/ids";
import { type Instant } from "@/lib/core/time";
import { correctRemoval } from "@/lib/removals/commands/correct";
import { enterReceipt, undoReceipt } from "@/lib/removals/commands/receipts";
import { takeAway } from "@/lib/removals/commands/take-away";
import { onPan } from "../shed";

import { asLead, base, any, lot, pickRow, rows, shown, REASON, type Act, type Bench } from "./desk";
const DAY = (at: Instant) => new Date(at).toISOString().slice(0, 10) as never;

function loadOf(bench: Bench) {
  const { random, shed } = bench;
  const from = random.chance(0.5) ? lot(bench, 20) : undefined;
  const [bin] = rows<{ grams: number }>(
    bench,
    `select b.grams from balances b join holders h on h.id = b.holder_id where h.kind = 'reject-bin'`,
  );
  const grams = from?.grams ?? bin?.grams ?? 0;
  if (grams < 10) return null;
  return {
    destinationId: random.chance(0.5) ? bench.destinations.disposed : bench.destinations.passedOn,
    day: DAY(bench.now),
    noteNumber: "",
    taking: {
      how: "weighed" as const,
      scaleId: shed.scaleId,
      loads: [
        {
          lotNumber: from?.number ?? null,
          whole: random.chance(0.4),
          readings: [onPan(shown(grams * (0.3 + random.next() * 0.72)))],
        },
      ],
    },
  };
}

export const remove: Act = (bench) => {
  const load = loadOf(bench);
  if (!load) return;
  const input = { ...base(bench), ...load, confirmedAbove: true };
  takeAway(asLead(bench, input), input);
};

export const correctARemoval: Act = (bench) => {
  const id = any<"removal">(bench, "removals");
  if (!id) return;
  const input = {
    ...base(bench),
    id,
    reason: REASON,
    replacement: bench.random.chance(0.3) ? null : loadOf(bench),
  };
  correctRemoval(asLead(bench, input), input);
};

export const receipt: Act = (bench) => {
  const found = pickRow<{ id: Id<"removal">; grams: number }>(
    bench,
    "select id, grams from removals where route = 'passed-on' and state = 'posted'",
  );
  if (!found) return;
  const input = {
    ...base(bench),
    id: found.id,
    number: `R-${bench.random.int(1_000_000)}`,
    day: DAY(bench.now),
    receivedGrams: found.grams,
  };
  enterReceipt(asLead(bench, input), input);
};

export const undoAReceipt: Act = (bench) => {
  const found = pickRow<{ id: Id<"removal">; receiptId: Id<"removal-receipt"> }>(
    bench,
    "select removal_id as id, id as receiptId from removal_receipts where state = 'posted'",
  );
  if (!found) return;
  const input = { ...base(bench), ...found };
  undoReceipt(asLead(bench, input), input);
};
