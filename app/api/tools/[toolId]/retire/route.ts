import { route } from "@/lib/http/route";
import { retireTool } from "@/lib/production/commands/retire";
import { retireToolEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(retireToolEndpoint, retireTool);
