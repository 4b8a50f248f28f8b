import { route } from "@/lib/http/route";
import { restoreColour } from "@/lib/stock/commands/palette";
import { restoreColourEndpoint } from "@/lib/stock/contract/palette";

export const POST = route(restoreColourEndpoint, restoreColour);
