import { route } from "@/lib/http/route";
import { mergeLot } from "@/lib/stock/commands/move-lot";
import { mergeLotEndpoint } from "@/lib/stock/contract/moves";

export const POST = route(mergeLotEndpoint, mergeLot);
