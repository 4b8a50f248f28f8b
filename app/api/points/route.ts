import { route } from "@/lib/http/route";
import { addPoint } from "@/lib/points/commands";
import { addPointEndpoint, listPointsEndpoint } from "@/lib/points/contract";
import { listPoints } from "@/lib/points/queries";

export const GET = route(listPointsEndpoint, listPoints);
export const POST = route(addPointEndpoint, addPoint);
