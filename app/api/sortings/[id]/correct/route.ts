import { route } from "@/lib/http/route";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { correctSortingEndpoint } from "@/lib/sorting/contract/sortings";

export const POST = route(correctSortingEndpoint, correctSorting);
