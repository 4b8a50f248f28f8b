import { route } from "@/lib/http/route";
import { listLotsEndpoint } from "@/lib/stock/contract/lots";
import { listLots } from "@/lib/stock/queries/lots";

export const GET = route(listLotsEndpoint, listLots);
