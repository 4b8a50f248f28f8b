import { route } from "@/lib/http/route";
import { openStock } from "@/lib/stock/commands/open-stock";
import { openStockEndpoint } from "@/lib/stock/contract/counts";

export const POST = route(openStockEndpoint, openStock);
