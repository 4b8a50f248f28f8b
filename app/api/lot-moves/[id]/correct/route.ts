import { route } from "@/lib/http/route";
import { correctMove } from "@/lib/stock/commands/correct-move";
import { correctMoveEndpoint } from "@/lib/stock/contract/moves";

export const POST = route(correctMoveEndpoint, correctMove);
