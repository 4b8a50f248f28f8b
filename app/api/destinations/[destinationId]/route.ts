import { route } from "@/lib/http/route";
import { changeDestination } from "@/lib/removals/commands/destinations";
import { changeDestinationEndpoint } from "@/lib/removals/contract/destinations";

export const PUT = route(changeDestinationEndpoint, changeDestination);
