import { route } from "@/lib/http/route";
import { retireDestination } from "@/lib/removals/commands/destinations";
import { retireDestinationEndpoint } from "@/lib/removals/contract/destinations";

export const POST = route(retireDestinationEndpoint, retireDestination);
