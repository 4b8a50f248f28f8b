import { route } from "@/lib/http/route";
import { changeColour } from "@/lib/stock/commands/palette";
import { changeColourEndpoint } from "@/lib/stock/contract/palette";

export const PATCH = route(changeColourEndpoint, changeColour);
