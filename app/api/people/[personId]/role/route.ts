import { route } from "@/lib/http/route";
import { changeRole } from "@/lib/identity/commands/people";
import { changeRoleEndpoint } from "@/lib/identity/contract";

export const PUT = route(changeRoleEndpoint, changeRole);
