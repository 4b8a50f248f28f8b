import { route } from "@/lib/http/route";
import { stockEndpoint } from "@/lib/stock/contract/stock";
import { getStock } from "@/lib/stock/queries/stock";

export const GET = route(stockEndpoint, getStock);
