import { route } from "@/lib/http/route";
import { clearScale } from "@/lib/scales/commands/checks";
import { clearScaleEndpoint } from "@/lib/scales/contract/checks";

export const POST = route(clearScaleEndpoint, clearScale);
