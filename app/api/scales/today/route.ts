import { route } from "@/lib/http/route";
import { listScalesToday } from "@/lib/scales/queries/checks";
import { scalesTodayEndpoint } from "@/lib/scales/contract/checks";

export const GET = route(scalesTodayEndpoint, listScalesToday);
