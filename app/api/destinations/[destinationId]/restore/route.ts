import { route } from "@/lib/http/route";
import { restoreDestination } from "@/lib/removals/commands/destinations";
import { restoreDestinationEndpoint } from "@/lib/removals/contract/destinations";

export const POST = route(restoreDestinationEndpoint, restoreDestination);
