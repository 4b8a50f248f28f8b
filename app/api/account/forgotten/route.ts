import { route } from "@/lib/http/route";
import { requestPasswordReset } from "@/lib/identity/commands/account";
import { forgottenPasswordEndpoint } from "@/lib/identity/contract";

export const POST = route(forgottenPasswordEndpoint, requestPasswordReset);
