/** What the dialogs of a lot need to know of it. */
import type { LotView } from "@/lib/stock/queries/lots";

export type LotFacts = Pick<
  LotView,
  | "number"
  | "polymer"
  | "kind"
  | "colourCode"
  | "colourName"
  | "form"
  | "wash"
  | "heldGrams"
  | "containerId"
  | "seen"
  | "closedAt"
>;
