import { route } from "@/lib/http/route";
import { closeLot } from "@/lib/stock/commands/close-lot";
import { closeLotEndpoint } from "@/lib/stock/contract/lot-care";

export const POST = route(closeLotEndpoint, closeLot);
