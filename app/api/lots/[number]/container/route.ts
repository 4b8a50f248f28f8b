import { route } from "@/lib/http/route";
import { setLotContainer } from "@/lib/stock/commands/container";
import { setLotContainerEndpoint } from "@/lib/stock/contract/lot-care";

export const PUT = route(setLotContainerEndpoint, setLotContainer);
