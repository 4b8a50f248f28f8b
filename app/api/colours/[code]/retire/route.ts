import { route } from "@/lib/http/route";
import { retireColour } from "@/lib/stock/commands/palette";
import { retireColourEndpoint } from "@/lib/stock/contract/palette";

export const POST = route(retireColourEndpoint, retireColour);
