import { route } from "@/lib/http/route";
import { todayEndpoint } from "@/lib/weighing/contract/weigh-ins";
import { getToday } from "@/lib/weighing/queries/weigh-ins";

export const GET = route(todayEndpoint, getToday);
