import { route } from "@/lib/http/route";
import { addTool } from "@/lib/production/commands/tools";
import { addToolEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(addToolEndpoint, addTool);
