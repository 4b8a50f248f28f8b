import { route } from "@/lib/http/route";
import { changeTool } from "@/lib/production/commands/tools";
import { changeToolEndpoint } from "@/lib/production/contract/catalogue";

export const PUT = route(changeToolEndpoint, changeTool);
