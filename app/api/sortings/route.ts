import { route } from "@/lib/http/route";
import { closeSorting } from "@/lib/sorting/commands/close";
import { closeSortingEndpoint } from "@/lib/sorting/contract/sortings";

export const POST = route(closeSortingEndpoint, closeSorting);
