import { route } from "@/lib/http/route";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { undoSortingEndpoint } from "@/lib/sorting/contract/sortings";

export const POST = route(undoSortingEndpoint, undoSorting);
