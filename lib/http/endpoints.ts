/**
 * Every endpoint of the program, from the contracts. A contract that is not imported here, and a handler
 * that serves no endpoint of the list, fail tests/integration/http.
 */
import * as audit from "@/lib/audit/contract";
import type { Endpoint } from "@/lib/core/endpoint";
import * as bags from "@/lib/bags/contract";
import * as identity from "@/lib/identity/contract";
import * as ledger from "@/lib/ledger/contract";
import * as points from "@/lib/points/contract";
import * as catalogue from "@/lib/production/contract/catalogue";
import * as plans from "@/lib/production/contract/plans";
import * as reservations from "@/lib/production/contract/reservations";
import * as retiring from "@/lib/production/contract/retiring";
import * as destinations from "@/lib/removals/contract/destinations";
import * as removalReceipts from "@/lib/removals/contract/receipts";
import * as removals from "@/lib/removals/contract/removals";
import * as reports from "@/lib/reports/contract";
import * as scaleChecks from "@/lib/scales/contract/checks";
import * as containers from "@/lib/scales/contract/containers";
import * as scales from "@/lib/scales/contract/scales";
import * as sortingDrafts from "@/lib/sorting/contract/drafts";
import * as sorting from "@/lib/sorting/contract/sortings";
import * as waiting from "@/lib/sorting/contract/waiting";
import * as counts from "@/lib/stock/contract/counts";
import * as lotCare from "@/lib/stock/contract/lot-care";
import * as limits from "@/lib/stock/contract/limits";
import * as lots from "@/lib/stock/contract/lots";
import * as moves from "@/lib/stock/contract/moves";
import * as palette from "@/lib/stock/contract/palette";
import * as steps from "@/lib/stock/contract/steps";
import * as stock from "@/lib/stock/contract/stock";
import * as uploads from "@/lib/uploads/contract";
import * as weighingCorrections from "@/lib/weighing/contract/corrections";
import * as weighing from "@/lib/weighing/contract/weigh-ins";
import * as own from "./own-endpoints";

const CONTRACTS: readonly Readonly<Record<string, unknown>>[] = [
  audit,
  uploads,
  identity,
  points,
  bags,
  scales,
  containers,
  scaleChecks,
  ledger,
  stock,
  lots,
  limits,
  lotCare,
  counts,
  moves,
  catalogue,
  retiring,
  plans,
  reservations,
  steps,
  palette,
  weighing,
  weighingCorrections,
  sorting,
  sortingDrafts,
  waiting,
  destinations,
  removals,
  removalReceipts,
  reports,
  own,
];

function isEndpoint(exported: unknown): exported is Endpoint {
  return (
    typeof exported === "object" &&
    exported !== null &&
    "method" in exported &&
    "path" in exported &&
    "permission" in exported
  );
}

/** In the order of the areas. */
export const ENDPOINTS: readonly Endpoint[] = CONTRACTS.flatMap((contract) =>
  Object.values(contract).filter(isEndpoint),
);
