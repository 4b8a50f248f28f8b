import { route } from "@/lib/http/route";
import { changeScale } from "@/lib/scales/commands/scales";
import { changeScaleEndpoint } from "@/lib/scales/contract/scales";

export const PUT = route(changeScaleEndpoint, changeScale);
