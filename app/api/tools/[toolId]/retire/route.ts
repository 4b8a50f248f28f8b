import { route } from "@/lib/http/route";
import { retireTool } from "@/lib/production/commands/tools";
import { retireToolEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(retireToolEndpoint, retireTool);
