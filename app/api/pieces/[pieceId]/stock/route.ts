import { route } from "@/lib/http/route";
import { planStockEndpoint } from "@/lib/production/contract/plans";
import { getPlanStock } from "@/lib/production/queries/plan-stock";

export const GET = route(planStockEndpoint, getPlanStock);
