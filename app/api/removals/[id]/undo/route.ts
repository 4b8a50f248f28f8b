import { route } from "@/lib/http/route";
import { undoRemoval } from "@/lib/removals/commands/take-away";
import { undoRemovalEndpoint } from "@/lib/removals/contract/removals";

export const POST = route(undoRemovalEndpoint, undoRemoval);
