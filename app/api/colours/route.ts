import { route } from "@/lib/http/route";
import { addColour, orderColours } from "@/lib/stock/commands/palette";
import {
  addColourEndpoint,
  listColoursEndpoint,
  orderColoursEndpoint,
} from "@/lib/stock/contract/palette";
import { listColours } from "@/lib/stock/queries/palette";

export const GET = route(listColoursEndpoint, listColours);
export const POST = route(addColourEndpoint, addColour);
export const PUT = route(orderColoursEndpoint, orderColours);
