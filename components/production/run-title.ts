import type { RunSummary } from "@/lib/production/contract/plans";
import { MADE_BY, type Method } from "@/lib/production/terms";

/** "40 × coaster, moulded" */
export function runTitle(run: Pick<RunSummary, "wantedPieces" | "pieceName" | "method">): string {
  return `${run.wantedPieces} × ${run.pieceName.toLowerCase()}, ${MADE_BY[run.method as Method]}`;
}
