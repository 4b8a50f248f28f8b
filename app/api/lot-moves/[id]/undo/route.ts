import { route } from "@/lib/http/route";
import { undoMove } from "@/lib/stock/commands/undo-move";
import { undoMoveEndpoint } from "@/lib/stock/contract/moves";

export const POST = route(undoMoveEndpoint, undoMove);
