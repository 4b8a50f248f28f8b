import { route } from "@/lib/http/route";
import { countLot } from "@/lib/stock/commands/count-lot";
import { countLotEndpoint } from "@/lib/stock/contract/counts";

export const POST = route(countLotEndpoint, countLot);
