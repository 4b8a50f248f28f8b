import { route } from "@/lib/http/route";
import { setLotPlace } from "@/lib/stock/commands/place";
import { setLotPlaceEndpoint } from "@/lib/stock/contract/lots";

export const PUT = route(setLotPlaceEndpoint, setLotPlace);
