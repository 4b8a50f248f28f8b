import { route } from "@/lib/http/route";
import { lotMovementsEndpoint } from "@/lib/stock/contract/lots";
import { listLotMovements } from "@/lib/stock/queries/lot-movements";

export const GET = route(lotMovementsEndpoint, listLotMovements);
