import { route } from "@/lib/http/route";
import { addMachine } from "@/lib/production/commands/machines";
import { addMachineEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(addMachineEndpoint, addMachine);
