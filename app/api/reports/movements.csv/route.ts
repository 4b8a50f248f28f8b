import { streamRoute } from "@/lib/http/route";
import { movementsCsvEndpoint } from "@/lib/reports/contract";
import { exportMovements } from "@/lib/reports/queries/exports";
import { csvHeaders } from "@/lib/reports/rules/csv-headers";

export const GET = streamRoute(
  movementsCsvEndpoint,
  (ctx, input) =>
    new Response(exportMovements(ctx, input), { headers: csvHeaders("movements", input) }),
);
