import { route } from "@/lib/http/route";
import { addScale } from "@/lib/scales/commands/scales";
import { addScaleEndpoint, listScalesEndpoint } from "@/lib/scales/contract/scales";
import { listScales } from "@/lib/scales/queries/scales";

export const GET = route(listScalesEndpoint, listScales);
export const POST = route(addScaleEndpoint, addScale);
