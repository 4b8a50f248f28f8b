import { route } from "@/lib/http/route";
import { checkScale } from "@/lib/scales/commands/checks";
import { checkScaleEndpoint } from "@/lib/scales/contract/checks";

export const POST = route(checkScaleEndpoint, checkScale);
