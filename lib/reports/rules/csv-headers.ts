/** Invariant: a downloaded file says by its name and type what it is, and nothing between may hold it back. */
import type { Grouping } from "../terms";
import type { Period } from "@/lib/core/time";
import { exportName } from "./periods";

/** "?from=2026-03-01&until=2026-06-01&by=month,point" */
export function exportQuery(period: Period, by: readonly Grouping[]): string {
  const query = new URLSearchParams({ from: period.from, until: period.until });
  if (by.length > 0) query.set("by", by.join(","));
  return `?${query.toString()}`;
}

/** Response headers of a CSV download; the balance's names its description (CSVW, 5.2 Link Header). */
export function csvHeaders(
  what: "balance" | "movements",
  input: Period & { by?: readonly Grouping[] },
): Record<string, string> {
  const headers: Record<string, string> = {
    "content-type": "text/csv; charset=utf-8; header=present",
    "content-disposition": `attachment; filename="${exportName(what, input, "csv")}"`,
    // A proxy that collects the answer before passing it on would undo the streaming.
    "x-accel-buffering": "no",
  };
  if (what === "balance") {
    const query = exportQuery(input, input.by ?? []);
    headers.link = `<balance.csv-metadata.json${query}>; rel="describedby"; type="application/csvm+json"`;
  }
  return headers;
}
