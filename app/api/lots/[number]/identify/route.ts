import { route } from "@/lib/http/route";
import { identifyLot } from "@/lib/stock/commands/move-lot";
import { identifyLotEndpoint } from "@/lib/stock/contract/moves";

export const POST = route(identifyLotEndpoint, identifyLot);
