import { route } from "@/lib/http/route";
import { undoStep } from "@/lib/stock/commands/undo-step";
import { undoStepEndpoint } from "@/lib/stock/contract/steps";

export const POST = route(undoStepEndpoint, undoStep);
