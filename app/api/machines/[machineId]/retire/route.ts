import { route } from "@/lib/http/route";
import { retireMachine } from "@/lib/production/commands/machines";
import { retireMachineEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(retireMachineEndpoint, retireMachine);
