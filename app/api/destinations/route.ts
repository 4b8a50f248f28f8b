import { route } from "@/lib/http/route";
import { addDestination } from "@/lib/removals/commands/destinations";
import {
  addDestinationEndpoint,
  listDestinationsEndpoint,
} from "@/lib/removals/contract/destinations";
import { listDestinations } from "@/lib/removals/queries/destinations";

export const GET = route(listDestinationsEndpoint, listDestinations);
export const POST = route(addDestinationEndpoint, addDestination);
