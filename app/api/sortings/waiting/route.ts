import { route } from "@/lib/http/route";
import { waitingBagsEndpoint } from "@/lib/sorting/contract/waiting";
import { listWaitingBags } from "@/lib/sorting/queries/waiting";

export const GET = route(waitingBagsEndpoint, listWaitingBags);
