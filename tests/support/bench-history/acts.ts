/** What people do at the bench in a random history: one command each, with whatever numbers come. */
import { undoRemoval } from "@/lib/removals/commands/take-away";
import { undoCount } from "@/lib/stock/commands/undo-count";
import { undoMove } from "@/lib/stock/commands/undo-move";
import { undoStep } from "@/lib/stock/commands/undo-step";
import { asVolunteer, undoOf, type Act } from "./desk";
import { correctARemoval, receipt, remove, undoAReceipt } from "./removal-acts";
import { correctSort, correctWeighing, sort, undoSort, weigh } from "./sorting-acts";
import { correctACount, correctAMove, correctAStep, count, merge, split, step } from "./stock-acts";

/** Each act with how often it comes. */
export const ACTS: readonly (readonly [name: string, act: Act, weight: number])[] = [
  ["weigh", weigh, 16],
  ["sort", sort, 14],
  ["undo a sorting", undoSort, 3],
  ["correct a sorting", correctSort, 4],
  ["correct a weigh-in", correctWeighing, 4],
  ["step", step, 10],
  ["undo a step", undoOf<"step">("steps", undoStep), 5],
  ["correct a step", correctAStep, 4],
  ["count", count, 7],
  ["undo a count", undoOf<"count">("counts", undoCount, asVolunteer), 4],
  ["correct a count", correctACount, 3],
  ["split", split, 4],
  ["merge", merge, 4],
  ["undo a move", undoOf<"lot-move">("lot_moves", undoMove), 5],
  ["correct a move", correctAMove, 3],
  ["take away", remove, 6],
  ["undo a removal", undoOf<"removal">("removals", undoRemoval), 5],
  ["correct a removal", correctARemoval, 3],
  ["receipt", receipt, 5],
  ["undo a receipt", undoAReceipt, 5],
];
