import { route } from "@/lib/http/route";
import { retireScale } from "@/lib/scales/commands/scales";
import { retireScaleEndpoint } from "@/lib/scales/contract/scales";

export const POST = route(retireScaleEndpoint, retireScale);
