import { route } from "@/lib/http/route";
import { balanceMetadataEndpoint } from "@/lib/reports/contract";
import { getBalanceDescription } from "@/lib/reports/queries/exports";

export const GET = route(balanceMetadataEndpoint, getBalanceDescription);
