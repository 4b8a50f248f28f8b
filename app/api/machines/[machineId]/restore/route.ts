import { route } from "@/lib/http/route";
import { restoreMachine } from "@/lib/production/commands/retire";
import { restoreMachineEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(restoreMachineEndpoint, restoreMachine);
