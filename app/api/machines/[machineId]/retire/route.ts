import { route } from "@/lib/http/route";
import { retireMachine } from "@/lib/production/commands/retire";
import { retireMachineEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(retireMachineEndpoint, retireMachine);
