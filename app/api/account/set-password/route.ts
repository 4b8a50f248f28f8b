import { route } from "@/lib/http/route";
import { setPassword } from "@/lib/identity/commands/account";
import { setPasswordEndpoint } from "@/lib/identity/contract";

export const POST = route(setPasswordEndpoint, setPassword);
