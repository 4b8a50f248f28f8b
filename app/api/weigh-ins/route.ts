import { route } from "@/lib/http/route";
import { weighBag } from "@/lib/weighing/commands/weigh-bag";
import { weighInEndpoint } from "@/lib/weighing/contract/weigh-ins";

export const POST = route(weighInEndpoint, weighBag);
