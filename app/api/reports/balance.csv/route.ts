import { streamRoute } from "@/lib/http/route";
import { balanceCsvEndpoint } from "@/lib/reports/contract";
import { exportBalance } from "@/lib/reports/queries/exports";
import { csvHeaders } from "@/lib/reports/rules/csv-headers";

export const GET = streamRoute(
  balanceCsvEndpoint,
  (ctx, input) =>
    new Response(exportBalance(ctx, input), { headers: csvHeaders("balance", input) }),
);
