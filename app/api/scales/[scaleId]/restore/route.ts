import { route } from "@/lib/http/route";
import { restoreScale } from "@/lib/scales/commands/scales";
import { restoreScaleEndpoint } from "@/lib/scales/contract/scales";

export const POST = route(restoreScaleEndpoint, restoreScale);
