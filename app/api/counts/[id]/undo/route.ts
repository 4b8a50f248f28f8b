import { route } from "@/lib/http/route";
import { undoCount } from "@/lib/stock/commands/undo-count";
import { undoCountEndpoint } from "@/lib/stock/contract/counts";

export const POST = route(undoCountEndpoint, undoCount);
