import { route } from "@/lib/http/route";
import { changeMachine } from "@/lib/production/commands/machines";
import { changeMachineEndpoint } from "@/lib/production/contract/catalogue";

export const PUT = route(changeMachineEndpoint, changeMachine);
