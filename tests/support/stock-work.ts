/** What tests of the stock send and read: counts, steps, rows of the database. */
import type { IdentifyLotInput, MergeLotInput } from "@/lib/stock/contract/moves";
import { newId } from "@/lib/core/ids";
import { saveStep } from "@/lib/stock/commands/save-step";
import type { CountLotInput } from "@/lib/stock/contract/counts";
import { saveStepSchema, type SaveStepInput, type StepReceipt } from "@/lib/stock/contract/steps";
import { NOON, type TestScheme } from "./scheme";
import { onFineScale, type StockRoom } from "./stock-room";

/** A count as a client sends it that has seen the lot as it stands. */
export const count = (
  of: StockRoom,
  number: number,
  grams: number | "empty",
  more: Partial<CountLotInput> = {},
): CountLotInput => ({
  requestId: newId(NOON),
  number,
  occurredAt: NOON,
  counted: grams === "empty" ? { found: "empty" } : { found: "weighed", ...of.weighed(grams) },
  seen: of.seen(number),
  confirmed: false,
  ...more,
});

/** Rows of the database. */
export const rows = (of: TestScheme, sql: string, ...values: unknown[]) =>
  of.db.reader.client.prepare(sql).all(...values);

/** Lines of the last entry, with what a reading says. */
export const lastLines = (of: TestScheme) =>
  rows(
    of,
    "select account, grams, basis, scale_id as scale, mpe_mg as mpe from lines where entry_id = (select max(id) from entries) order by seq",
  );

type Sent = Parameters<(typeof saveStepSchema)["parse"]>[0];
/** A reading of what came out of a step. */
export const out = (of: StockRoom, grams: number, more: object = {}) => ({
  scaleId: of.scaleId,
  reading: onFineScale(grams),
  ...more,
});
/** All that the book holds of a lot. */
export const all = (number: number) => ({ number, amount: { how: "all" } });
/** A step as a client sends it, through the contract. */
export const step = (of: StockRoom, more: object): SaveStepInput =>
  saveStepSchema.parse({
    requestId: newId(NOON),
    kind: "shredding",
    occurredAt: NOON,
    ...more,
  } satisfies Sent);
/** The ledger's worked example: 3160 g of two points to 3151 g of flake and 9 g of dust. */
export const example = (of: StockRoom): SaveStepInput => {
  of.fill(2160, {}, 0);
  const number = of.fill(1000, {}, 1);
  return step(of, {
    minutes: 45,
    inputs: [all(number)],
    outputs: [out(of, 3151)],
    losses: [{ cause: "dust", grams: 9 }],
  });
};
/** Saves a step as a lead. */
export const save = (of: StockRoom, more: object, at = NOON): StepReceipt => {
  const input = step(of, more);
  return saveStep(of.ctx("lead", at, input), input);
};

/** Two lots of one material: the first is closed, so that the second opened. */
export function twoLots(of: StockRoom): [number, number] {
  const first = of.fill(2000, {}, 0);
  of.db.writer.client
    .prepare("update lots set closed_at = ?, closed_for = 'full' where number = ?")
    .run(NOON, first);
  return [first, of.fill(1000, {}, 1)];
}

export const merge = (
  number: number,
  toNumber: number,
  more: Partial<MergeLotInput> = {},
): MergeLotInput => ({
  requestId: newId(NOON),
  number,
  toNumber,
  amount: { how: "all" },
  count: null,
  occurredAt: NOON,
  ...more,
});

export const taken = (of: StockRoom, grams: number, all = false) => ({
  how: "taken" as const,
  all,
  ...of.weighed(grams),
});

export const identify = (number: number): IdentifyLotInput => ({
  requestId: newId(NOON),
  number,
  polymer: "PP",
  kind: "tubs",
  colourCode: "white",
  method: "float",
  amount: { how: "all" },
  count: null,
  occurredAt: NOON,
});
