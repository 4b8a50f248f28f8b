import { route } from "@/lib/http/route";
import { changePassword } from "@/lib/identity/commands/account";
import { changePasswordEndpoint } from "@/lib/identity/contract";

export const POST = route(changePasswordEndpoint, changePassword);
