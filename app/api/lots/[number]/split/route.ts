import { route } from "@/lib/http/route";
import { splitLot } from "@/lib/stock/commands/move-lot";
import { splitLotEndpoint } from "@/lib/stock/contract/moves";

export const POST = route(splitLotEndpoint, splitLot);
