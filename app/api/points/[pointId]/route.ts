import { route } from "@/lib/http/route";
import { changePoint } from "@/lib/points/commands";
import { changePointEndpoint } from "@/lib/points/contract";

export const PATCH = route(changePointEndpoint, changePoint);
