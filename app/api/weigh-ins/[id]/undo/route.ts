import { route } from "@/lib/http/route";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import { undoWeighInEndpoint } from "@/lib/weighing/contract/weigh-ins";

export const POST = route(undoWeighInEndpoint, undoWeighIn);
