import { route } from "@/lib/http/route";
import { todayEndpoint } from "@/lib/weighing/contract";
import { getToday } from "@/lib/weighing/queries";

export const GET = route(todayEndpoint, getToday);
