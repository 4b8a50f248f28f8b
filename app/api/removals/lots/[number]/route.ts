import { route } from "@/lib/http/route";
import { getLotToTake } from "@/lib/removals/queries/lot-to-take";
import { lotToTakeEndpoint } from "@/lib/removals/contract/removals";

export const GET = route(lotToTakeEndpoint, getLotToTake);
