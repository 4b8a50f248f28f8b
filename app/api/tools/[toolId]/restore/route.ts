import { route } from "@/lib/http/route";
import { restoreTool } from "@/lib/production/commands/retire";
import { restoreToolEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(restoreToolEndpoint, restoreTool);
