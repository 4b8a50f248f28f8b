import { route } from "@/lib/http/route";
import { setLimits } from "@/lib/stock/commands/limits";
import { getLimitsEndpoint, setLimitsEndpoint } from "@/lib/stock/contract/limits";
import { getStorageStanding } from "@/lib/stock/queries/limits";

export const GET = route(getLimitsEndpoint, getStorageStanding);
export const PUT = route(setLimitsEndpoint, setLimits);
